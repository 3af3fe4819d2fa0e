import react from '@vitejs/plugin-react';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const here = (path: string) => fileURLToPath(new URL(path, import.meta.url));
const resolve = { alias: { '@shared': here('./shared'), '@': here('./src') } };

export default defineConfig({
  test: {
    projects: [
      {
        resolve,
        test: {
          name: 'unit',
          environment: 'node',
          include: ['tests/**/*.test.ts'],
          exclude: ['tests/server/**', 'tests/client/**', 'tests/bench/**'],
        },
      },
      {
        resolve,
        plugins: [react()],
        test: {
          name: 'client',
          environment: 'jsdom',
          include: ['tests/client/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/client/support/setup.ts'],
          sequence: { groupOrder: 1 },
        },
      },
      {
        resolve,
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/server/support/global-setup.ts'],
          maxWorkers: 2,
          // projects with their own number of workers run one after the other
          sequence: { groupOrder: 2 },
          hookTimeout: 60_000,
          testTimeout: 30_000,
        },
      },
    ],
  },
});
