import js from '@eslint/js';
import reactHooks from 'eslint-plugin-react-hooks';
import { reactRefresh } from 'eslint-plugin-react-refresh';
import { defineConfig, globalIgnores } from 'eslint/config';
import globals from 'globals';
import tseslint from 'typescript-eslint';
import { borders } from './scripts/lint/borders.mjs';

const code = { skipBlankLines: true, skipComments: true };
/** @returns {Partial<import('eslint').Linter.RulesRecord>} */
const longestFunction = (/** @type {number} */ max) => ({ 'max-lines-per-function': ['error', { max, ...code }] });

const raw = 'CallExpression[callee.property.name=/^(raw|\\w+Raw)$/]';
const boundOnly = 'Give values to SQL as bindings (?), never by building the string.';
/** @type {Partial<import('eslint').Linter.RulesRecord>} */
const noStringBuiltSql = {
  'no-restricted-syntax': [
    'error',
    { selector: `${raw} > TemplateLiteral[expressions.length>0]:first-child`, message: boundOnly },
    { selector: `${raw} > BinaryExpression:first-child`, message: boundOnly },
  ],
};

export default defineConfig(
  globalIgnores(['dist', 'node_modules', '.data', '.test-data', 'coverage', 'docs', 'tests/borders/fixture-*']),
  js.configs.recommended,
  tseslint.configs.recommendedTypeChecked,
  {
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    plugins: { borders },
    rules: {
      'borders/one-way': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      'max-lines': ['error', { max: 300, ...code }],
      ...longestFunction(60),
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      // An event handler in JSX may be async: its rejections are the handler's own to catch.
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
    },
  },
  { files: ['server/**', 'jobs/**', 'seeds/**', 'src/**', 'contracts/**'], rules: { 'no-console': 'error' } },
  { files: ['server/**', 'jobs/**', 'seeds/**', 'scripts/**'], rules: noStringBuiltSql },
  // A migration is one list of statements, read from top to bottom and never edited.
  { files: ['migrations/**'], rules: { 'max-lines-per-function': 'off' } },
  {
    files: ['src/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat['recommended-latest'], reactRefresh.configs.vite()],
    languageOptions: { globals: globals.browser },
  },
  { files: ['src/**/*.tsx'], rules: longestFunction(120) },
  {
    files: ['tests/**', 'src/**/*.test.{ts,tsx}', 'src/**/testing/**'],
    rules: {
      'borders/one-way': 'off',
      'max-lines-per-function': 'off',
      'react-refresh/only-export-components': 'off',
      // supertest hands bodies back untyped; a test says what it expects of them right there.
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      // `expect(spy.method)` and stand-ins for what the test's document lacks.
      '@typescript-eslint/unbound-method': 'off',
    },
  },
  {
    files: ['**/*.{js,mjs}'],
    extends: [tseslint.configs.disableTypeChecked],
    languageOptions: { globals: globals.node },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'off',
      '@typescript-eslint/switch-exhaustiveness-check': 'off',
    },
  },
  { files: ['public/**/*.js'], languageOptions: { globals: { ...globals.browser, ...globals.serviceworker } } },
  {
    // Kept bad examples: no part of any tsconfig, looked at only by their own test.
    files: ['tests/borders/fixture-*/**/*.ts'],
    extends: [tseslint.configs.disableTypeChecked],
    rules: {
      'borders/one-way': 'error',
      '@typescript-eslint/consistent-type-imports': 'off',
      '@typescript-eslint/switch-exhaustiveness-check': 'off',
      ...noStringBuiltSql,
    },
  },
);
