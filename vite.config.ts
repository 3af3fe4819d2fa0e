import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vite';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));

/** BRIMLINE_API is set by the start program; without it the dev server has nothing to talk to. */
const api = process.env.BRIMLINE_API ?? 'http://127.0.0.1:3100';

export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: here('./src/public'),
  resolve: { alias: { '@shared': here('./shared'), '@': here('./src') } },
  server: {
    host: '127.0.0.1',
    strictPort: true,
    watch: { ignored: ['**/.state/**', '**/dist/**'] },
    proxy: { '/api': { target: api, changeOrigin: false }, '/mailbox': { target: api, changeOrigin: false } },
  },
  build: {
    outDir: 'dist/web',
    emptyOutDir: true,
    // data: URLs would need a laxer content security policy
    assetsInlineLimit: 0,
    manifest: true,
  },
});
