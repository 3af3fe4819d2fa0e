import react from '@vitejs/plugin-react';
import { readFileSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gzipSync } from 'node:zlib';
import { build } from 'vite';
import { round, tell } from './interleave';

type Manifest = Record<
  string,
  { file: string; isEntry?: boolean; imports?: string[]; dynamicImports?: string[]; src?: string }
>;

const web = 'dist/web';

const sizeOf = (file: string): number => gzipSync(readFileSync(join(web, file)), { level: 9 }).length;

/** Every script that must be there before a page can draw: the chunk and all it imports at once. */
function closure(manifest: Manifest, keys: readonly string[]): Set<string> {
  const files = new Set<string>();
  const visit = (key: string) => {
    const chunk = manifest[key];
    if (!chunk || files.has(chunk.file)) return;
    files.add(chunk.file);
    chunk.imports?.forEach(visit);
  };
  keys.forEach(visit);
  return files;
}

const total = (files: Set<string>): number =>
  [...files].filter((file) => file.endsWith('.js')).reduce((sum, file) => sum + sizeOf(file), 0);

const SHELL = `import { createRoot } from 'react-dom/client';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { QueryClient, QueryClientProvider, useQuery } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { zodResolver } from '@hookform/resolvers/zod';
import { z } from 'zod';
const schema = z.object({ a: z.string() });
function Page() {
  const form = useForm({ resolver: zodResolver(schema) });
  const query = useQuery({ queryKey: ['a'], queryFn: () => fetch('/a').then((r) => r.json()) });
  return <form onSubmit={form.handleSubmit(() => undefined)}><input {...form.register('a')} />{String(query.data)}</form>;
}
const router = createBrowserRouter([{ path: '/', element: <Page /> }]);
createRoot(document.getElementById('root')).render(<QueryClientProvider client={new QueryClient()}><RouterProvider router={router} /></QueryClientProvider>);`;

/** A bare page with the same libraries, built the same way; bytes after gzip. */
async function shellSize(): Promise<number> {
  const folder = mkdtempSync(resolve('.state', 'shell-'));
  try {
    writeFileSync(join(folder, 'main.tsx'), SHELL);
    const result = await build({
      root: folder,
      configFile: false,
      logLevel: 'silent',
      plugins: [react()],
      build: { write: false, rollupOptions: { input: join(folder, 'main.tsx') } },
    });
    const chunks = (Array.isArray(result) ? result : [result])
      .flatMap((one) => ('output' in one ? one.output : []))
      .flatMap((chunk) => (chunk.type === 'chunk' ? [chunk.code] : []));
    return chunks.reduce((bytes, code) => bytes + gzipSync(code, { level: 9 }).length, 0);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** First-load scripts of sign-in and of the order form, gzip, against a bare shell of the same libraries. */
export async function benchBundle(): Promise<void> {
  const manifest = JSON.parse(readFileSync(join(web, '.vite/manifest.json'), 'utf8')) as Manifest;
  const keyOf = (ending: string) => Object.keys(manifest).find((key) => key.endsWith(ending)) ?? '';
  const entry = Object.keys(manifest).find((key) => manifest[key]!.isEntry) ?? '';
  const signIn = total(closure(manifest, [entry]));
  const form = total(
    closure(manifest, [entry, keyOf('src/app/app-shell.tsx'), keyOf('orders/components/draft-page.tsx')]),
  );
  const shell = await shellSize();
  tell('sign-in page, scripts', `${round(signIn / 1000)} kB gzip`, '≤ 115 kB');
  tell(
    'order form, scripts',
    `${round(form / 1000)} kB gzip, bare shell ${round(shell / 1000)} kB, ratio ${round(form / shell)}`,
    '≤ 1.25',
  );
}
