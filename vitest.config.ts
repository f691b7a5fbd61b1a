import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const console = './tests/setup/console.ts';
const resolve = { alias: { '~': fileURLToPath(new URL('./src', import.meta.url)) } };

export default defineConfig({
  resolve,
  test: {
    maxWorkers: 2,
    projects: [
      {
        resolve,
        test: {
          name: 'unit',
          include: ['tests/unit/**/*.test.{ts,tsx}'],
          setupFiles: [console],
          testTimeout: 60_000,
        },
      },
      {
        resolve,
        test: {
          name: 'reference',
          include: ['tests/reference/**/*.test.ts'],
          setupFiles: [console],
          testTimeout: 60_000,
        },
      },
      {
        resolve,
        test: {
          name: 'server',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['./tests/server/setup/mariadb.ts'],
          setupFiles: ['./tests/server/setup/environment.ts', console],
          testTimeout: 30_000,
          hookTimeout: 30_000,
        },
      },
    ],
  },
});
