import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

const support = (file: string) => fileURLToPath(new URL(`./tests/support/${file}`, import.meta.url));

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'shared',
          environment: 'node',
          include: ['tests/{shared,reference,templates}/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: [support('engine-template.ts')],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
        },
      },
      {
        plugins: [react()],
        test: {
          name: 'src',
          environment: 'jsdom',
          include: ['tests/src/**/*.test.tsx'],
          setupFiles: [support('browser-setup.ts')],
        },
      },
      {
        test: {
          name: 'e2e',
          environment: 'node',
          include: ['tests/{e2e,chaos}/**/*.test.ts'],
          testTimeout: 120_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
