import { defineConfig, globalIgnores } from 'eslint/config';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTs from 'eslint-config-next/typescript';

/** Who may import what: app → components → lib, app → db, worker, lib; worker → db, lib; db → lib. */
const zones = [
  {
    target: './lib',
    from: ['./app', './components', './worker', './db', './samples', './tests'],
    message: 'lib is pure: what it needs comes in as an argument. A thing that two folders share belongs into lib itself.',
  },
  {
    target: './db',
    from: ['./app', './components', './worker', './tests'],
    message: 'db speaks SQL only: pages belong to app, jobs to worker, arithmetic to lib.',
  },
  {
    target: './worker',
    from: ['./app', './components', './tests'],
    message: 'worker runs without pages: what both need belongs into lib (arithmetic) or db (SQL).',
  },
  {
    target: './components',
    from: ['./app', './worker', './db', './tests'],
    message: 'components take plain data: read it in app with a query of db and hand it down.',
  },
];

const config = defineConfig([
  ...nextVitals,
  ...nextTs,
  globalIgnores(['.next/**', 'dist-worker/**', 'node_modules/**', 'next-env.d.ts', 'coverage/**', 'data/**', 'data-*/**']),
  {
    settings: { 'import/resolver': { typescript: { project: './tsconfig.json' } } },
    rules: {
      'import/no-restricted-paths': [
        'error',
        { zones: zones.flatMap(({ target, from, message }) => from.map((each) => ({ target, from: each, message }))) },
      ],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      eqeqeq: 'error',
    },
  },
  {
    files: ['lib/**/*.ts'],
    ignores: ['**/*.test.ts'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            { group: ['react', 'react-dom', 'next', 'next/*', 'kysely', 'better-sqlite3', 'node:fs', 'fs', 'node:fs/*'], message: 'lib is pure: no React, no Next, no SQL, no files.' }, // prettier-ignore
          ],
        },
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'lib has no clock: take the time as an argument.' },
        { object: 'Math', property: 'random', message: 'lib is reproducible: no randomness.' },
      ],
    },
  },
]);

export default config;
