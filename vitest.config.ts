import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url)).replace(/\/$/, '');
const alias = { '@': root };

/** Folders whose tests need a database: they get a cluster of their own for the run and a database per worker. */
const WITH_DATABASE = ['tests/db', 'tests/services', 'tests/api', 'tests/faults', 'tests/mail', 'tests/ops'];

const inFolder = (folder: string) => [`${folder}/**/*.test.ts`, `${folder}/**/*.test.tsx`];
const never = ['tests/e2e/**', 'tests/measure/**', 'node_modules/**'];

export default defineConfig({
  resolve: { alias },
  test: {
    // Two cores: more workers than that only take turns.
    maxWorkers: 2,
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'pure',
          environment: 'node',
          // A ceiling for a hang, not a measure: the heaviest check takes half a minute on an idle machine.
          testTimeout: 240_000,
          include: inFolder('tests'),
          exclude: [...never, ...WITH_DATABASE.map((folder) => `${folder}/**`)],
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'database',
          environment: 'node',
          testTimeout: 60_000,
          hookTimeout: 60_000,
          include: WITH_DATABASE.flatMap(inFolder),
          exclude: never,
          globalSetup: ['tests/support/database/start-test-cluster.ts'],
          setupFiles: ['tests/support/database/use-file-database.ts'],
        },
      },
    ],
  },
});
