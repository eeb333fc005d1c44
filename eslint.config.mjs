import nextCoreWebVitals from 'eslint-config-next/core-web-vitals';
import nextTypescript from 'eslint-config-next/typescript';
import { housePlugin } from './scripts/rooms.mjs';

const pure = 'A solver is pure: the same input gives the same bytes. A clock, a seed or a setting is an input.';

export default [
  { ignores: ['**/node_modules/**', '.next/**', '.next-*/**', '.data/**', 'next-env.d.ts', 'test-results/**'] },
  ...nextTypescript,
  // React's and the framework's rules are costly and have nothing to find where there are no components.
  ...nextCoreWebVitals.map((config) => (config.ignores && !config.rules ? config : { ...config, files: ['app/**/*.ts', 'app/**/*.tsx', 'proxy.ts'] })),
  {
    rules: {
      eqeqeq: ['error', 'smart'],
      'no-var': 'error',
      'prefer-const': 'error',
      // What goes wrong in the server is written to its error stream; nothing else speaks.
      'no-console': ['error', { allow: ['error', 'warn'] }],
      'no-throw-literal': 'error',
      'no-else-return': 'error',
      'object-shorthand': 'error',
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx', 'hack'], location: 'start' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/no-unused-expressions': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports', disallowTypeAnnotations: false }],
    },
  },
  { plugins: { house: housePlugin }, rules: { 'house/imports': 'error' } },
  {
    files: ['lib/solvers/**'],
    rules: {
      'no-restricted-globals': ['error', ...['process', 'performance', 'Date', 'crypto', 'fetch', 'setTimeout', 'setInterval'].map((name) => ({ name, message: pure }))],
      'no-restricted-properties': ['error', { object: 'Math', property: 'random', message: pure }],
    },
  },
  // A command's output is what its reader came for; a server's log goes to the same place.
  { files: ['scripts/**', 'db/migrate.ts', 'db/local-server.mjs', 'openapi/write.ts', 'tests/**'], rules: { 'no-console': 'off' } },
];
