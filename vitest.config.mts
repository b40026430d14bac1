import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig, type TestProjectInlineConfiguration } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const everyPage = 'tests/browser/axe.test.ts';
export default defineConfig({
  plugins: [react()],
  resolve: {
    alias: [
      { find: /^@\//, replacement: root },
      { find: 'server-only', replacement: `${root}tests/setup/server-only.ts` },
    ],
  },
  test: {
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'node',
          environment: 'node',
          include: ['{lib,worker,app,db,samples}/**/*.test.ts', 'tests/published/**/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'dom',
          environment: 'jsdom',
          include: ['components/**/*.test.tsx'],
          setupFiles: ['tests/setup/dom.ts'],
          testTimeout: 20_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'integration',
          environment: 'node',
          include: ['tests/integration/*.test.ts'],
          testTimeout: 180_000,
          hookTimeout: 180_000,
        },
      },
      // The look at every page takes as long as a third of the journeys: beside the shorter of the two.
      served('web', ['tests/integration/web/**/*.test.ts', everyPage]),
      served('browser', ['tests/browser/**/*.test.ts'], [everyPage]),
    ],
  },
});

/** Tests that ask a server: one for all of a project. */
function served(name: string, include: string[], exclude: string[] = []): TestProjectInlineConfiguration {
  return {
    extends: true,
    test: {
      name,
      environment: 'node',
      include,
      exclude,
      globalSetup: ['tests/setup/server.ts'],
      testTimeout: 120_000,
      hookTimeout: 300_000,
      fileParallelism: false,
    },
  };
}
