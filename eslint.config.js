import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import reactHooks from 'eslint-plugin-react-hooks';
import { defineConfig, globalIgnores } from 'eslint/config';
import globals from 'globals';
import tseslint from 'typescript-eslint';

/** The walls between the rooms (DEVELOPERS.md, "The map"): a room, and what it may not import. */
const closed = (room, patterns) => ({
  files: [`${room}/**/*.{ts,tsx}`],
  rules: {
    'no-restricted-imports': [
      'error',
      { patterns: patterns.map((regex) => ({ regex, message: `Not from ${room}.` })) },
    ],
  },
});

const OUTSIDE_SHARED = ['^@/', '^@server/', '^node:', '^(react|express|sequelize)'];
const OUTSIDE_SRC = ['^@server/', '^(express|sequelize|node:)'];
const ABOVE_FEATURES = ['^@/features/', '^@/pages/', '^@/app/'];

export default defineConfig([
  globalIgnores(['dist', '.data', '.cache', 'coverage', 'tests/reference/**/*.json']),
  js.configs.recommended,
  ...tseslint.configs.strictTypeChecked,
  {
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
  },
  {
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      '@typescript-eslint/no-unnecessary-condition': [
        'error',
        { allowConstantLoopConditions: true },
      ],
      '@typescript-eslint/no-unused-vars': [
        'error',
        { argsIgnorePattern: '^_', varsIgnorePattern: '^_' },
      ],
      complexity: ['error', { max: 12, variant: 'modified' }],
      eqeqeq: 'error',
      'max-lines': ['error', { max: 300, skipComments: true, skipBlankLines: true }],
      'max-params': ['error', 4],
      'no-console': 'error',
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat.recommended],
    languageOptions: { globals: globals.browser },
    // we do not compile away memoisation, so a library that cannot be is no trouble
    rules: { 'react-hooks/incompatible-library': 'off' },
  },
  {
    // a component's conditions are its layout: each `&&` of its markup counts as a branch
    files: ['src/**/*.tsx'],
    rules: { complexity: ['error', { max: 20, variant: 'modified' }] },
  },
  { files: ['server/**/*.ts', 'tests/**/*.{ts,tsx}'], languageOptions: { globals: globals.node } },
  {
    // A shape check or a loop bound has settled the index (DEVELOPERS.md, "The engine").
    files: [
      'shared/stats/**/*.ts',
      'shared/comminution/**/*.ts',
      'shared/calc/**/*.ts',
      'src/charts/**/*.ts',
      'tests/**/*.{ts,tsx}',
    ],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    // ECharts marks `itemStyle` of one member of its series union; the members used here have it
    files: ['src/charts/**/*.{ts,tsx}'],
    rules: { '@typescript-eslint/no-deprecated': 'off' },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      'max-lines': 'off',
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
  {
    files: ['scripts/**/*.mjs', 'examples/**/*.mjs', '*.js'],
    extends: [tseslint.configs.disableTypeChecked],
    languageOptions: { globals: globals.node },
    rules: { 'no-console': 'off' },
  },
  closed('shared', OUTSIDE_SHARED),
  // numerical packages only, and nothing of the shared rooms above
  closed('shared/stats', ['^(?!\\.|ml-|jstat)', '/(schemas|policies|calc|comminution)/']),
  closed('shared/comminution', ['^(?!\\.|ml-|jstat)', '/(schemas|policies|calc)/']),
  closed('shared/schemas', ['^(?!\\.|zod)', '/(calc|policies)/']),
  closed('server', ['^@/', '^react']),
  closed('src', OUTSIDE_SRC),
  ...['src/lib', 'src/components', 'src/charts', 'src/hooks', 'src/queries', 'src/engine'].map(
    (room) => closed(room, [...OUTSIDE_SRC, ...ABOVE_FEATURES]),
  ),
  closed('src/features', [...OUTSIDE_SRC, ...ABOVE_FEATURES, '\\.\\./\\.\\./']),
  prettier,
]);
