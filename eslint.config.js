import js from '@eslint/js';
import { defineConfig, globalIgnores } from 'eslint/config';
import globals from 'globals';
import reactHooks from 'eslint-plugin-react-hooks';
import reactRefresh from 'eslint-plugin-react-refresh';
import tseslint from 'typescript-eslint';

/** Each side's walls: who may import what. A pattern below is a path that the side must not reach. */
const walls = (patterns, paths = []) => ({
  'no-restricted-imports': ['error', { patterns, paths }],
});

const plainShared = [
  { group: ['**/src/**', '**/server/**', '**/tests/**'], message: 'shared knows no side.' },
  { group: ['node:*', 'express', 'drizzle-orm*', 'pg'], message: 'shared runs in the browser too.' },
];
const noReact = {
  group: ['react', 'react-dom', 'react/*', 'react-dom/*'],
  message: 'Only shared/print may import react.',
};

export default defineConfig([
  globalIgnores(['dist', '.tmp', 'data', 'coverage', 'server/platform/migrations']),
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat.recommended, reactRefresh.configs.vite],
    languageOptions: { globals: globals.browser },
    rules: walls([
      { group: ['**/server/**', '#server/*'], message: 'src never imports the server.' },
      { group: ['node:*'], message: 'src runs in the browser.' },
    ]),
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    ignores: ['src/lib/call.ts'],
    rules: {
      'no-restricted-globals': ['error', { name: 'fetch', message: 'Use call() of src/lib/call.ts.' }],
    },
  },
  { files: ['shared/**/*.ts'], ignores: ['shared/print/**'], rules: walls([...plainShared, noReact]) },
  { files: ['shared/print/**/*.{ts,tsx}'], rules: walls(plainShared) },
  {
    files: ['server/**/*.{ts,mjs}', '*.{ts,js}', 'tests/**/*.{ts,tsx}'],
    languageOptions: { globals: globals.node },
  },
  {
    files: ['server/**/*.{ts,tsx}'],
    ignores: ['server/platform/config.ts', 'server/commands/**'],
    rules: {
      ...walls([{ group: ['**/src/**'], message: 'server never imports src.' }]),
      'no-restricted-properties': [
        'error',
        { object: 'process', property: 'env', message: 'Read the environment in platform/config.ts only.' },
      ],
    },
  },
  { files: ['**/*.table.ts', 'tests/**'], rules: { 'max-lines': 'off' } },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
]);
