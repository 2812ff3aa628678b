/** Lint of the whole house. Everything is an error: a warning is either worth stopping for or not worth printing. */
import js from '@eslint/js';
import angular from 'angular-eslint';
import { defineConfig } from 'eslint/config';
import tseslint from 'typescript-eslint';
import { house, houseRoot } from './.lint/house-rules.mjs';

/** Files over 400 lines, each with its reason. */
const longFiles = [
  // One table of read models, read as a whole: what the server answers and the client shows.
  'shared/src/contract/views.ts',
];

const focusedOrSkipped = [
  {
    selector: 'CallExpression[callee.name=/^(fit|fdescribe|xit|xtest|xdescribe)$/]',
    message: 'No focused or skipped tests.',
  },
  {
    selector:
      'MemberExpression[object.name=/^(it|test|describe)$/][property.name=/^(only|skip|todo|failing|fixme|fail)$/]',
    message: 'No focused or skipped tests.',
  },
];

const builtSql = [
  {
    // A constant of the file may be part of a statement; anything else is bound.
    selector:
      'CallExpression[callee.property.name=/^(query|literal)$/] > TemplateLiteral.arguments > ' +
      '*.expressions:not(Identifier[name=/^[A-Z][A-Z0-9_]*$/])',
    message: 'Bind values; SQL is never built from pieces.',
  },
  {
    selector: 'CallExpression[callee.property.name=/^(query|literal)$/] > BinaryExpression.arguments',
    message: 'Bind values; SQL is never built from pieces.',
  },
  {
    selector: "CallExpression[callee.object.name='Sequelize'][callee.property.name='json']",
    message: 'Sequelize.json builds SQL from its argument (CVE-2026-30951).',
  },
];

const openedAddress = {
  selector:
    'CallExpression[callee.object.name=/^(app|router|server)$/i][callee.property.name=/^(get|post|put|patch|delete|all)$/]',
  message: 'Addresses are opened by the route table only (middleware/mount-routes.ts).',
};

export default defineConfig(
  {
    ignores: [
      ...['**/node_modules', 'dist*', '.data', '.angular', '.cache', 'coverage', 'screenshots', 'test-results'],
      ...['playwright-report', '.git'],
    ],
  },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },

  {
    files: ['**/*.mjs', '**/*.cjs'],
    extends: [js.configs.recommended],
    languageOptions: {
      globals: Object.fromEntries(
        ['console', 'process', 'globalThis', 'fetch', 'URL', 'AbortSignal', 'AbortController', 'Buffer', 'performance']
          .concat(['setTimeout', 'clearTimeout', 'setInterval', 'clearInterval'])
          .map((name) => [name, 'readonly']),
      ),
    },
  },

  {
    files: ['**/*.ts'],
    extends: [js.configs.recommended, tseslint.configs.recommendedTypeChecked],
    plugins: { house },
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: houseRoot } },
    rules: {
      'house/import-direction': 'error',
      'house/reason-for-exception': 'error',
      'max-lines': ['error', { max: 400, skipBlankLines: false, skipComments: false }],
      'no-restricted-syntax': ['error', ...focusedOrSkipped],
      'no-warning-comments': ['error', { terms: ['todo', 'fixme', 'xxx'] }],
      'no-eval': 'error',
      'no-new-func': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      // Engine and methods hand plain functions about in objects; none of them uses `this`.
      '@typescript-eslint/unbound-method': 'off',
      // A function that keeps an asynchronous promise may have nothing to wait for itself.
      '@typescript-eslint/require-await': 'off',
      // The tape keeps its operation codes in typed arrays, where they are plain numbers.
      '@typescript-eslint/no-unsafe-enum-comparison': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  {
    // A test fails when what it asserts to be there is not; and answers of the API are `any` until they are asserted on.
    files: ['**/*.spec.ts', '**/testing/**/*.ts', 'backend/test/**/*.ts', 'shared/bench/**/*.ts'],
    rules: {
      '@typescript-eslint/no-non-null-assertion': 'off',
      ...Object.fromEntries(
        ['argument', 'assignment', 'call', 'member-access', 'return'].map((what) => [
          `@typescript-eslint/no-unsafe-${what}`,
          'off',
        ]),
      ),
    },
  },
  {
    // Indices inside the tape are bounded by its construction, and its loops are what the benchmarks time.
    files: ['shared/src/engine/**/*.ts'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  // Belongs to no TypeScript project: it configures the runner of one.
  { files: ['playwright.config.ts'], extends: [tseslint.configs.disableTypeChecked] },
  { files: longFiles, rules: { 'max-lines': 'off' } },

  {
    files: ['backend/src/**/*.ts', 'database/**/*.ts'],
    rules: { 'no-restricted-syntax': ['error', ...focusedOrSkipped, ...builtSql, openedAddress] },
  },
  {
    // The two places that open addresses: the route table under /api, and the pages of the client.
    files: ['backend/src/middleware/mount-routes.ts', 'backend/src/middleware/client-pages.ts'],
    rules: { 'no-restricted-syntax': ['error', ...focusedOrSkipped, ...builtSql] },
  },
  {
    files: ['shared/src/**/*.ts'],
    rules: {
      // The core knows nothing of time, chance, the machine or the network: the same inputs give the same study everywhere.
      'no-restricted-globals': ['error', 'process', 'window', 'document', 'fetch', 'setTimeout', 'setInterval'],
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'Time comes in with the command.' },
        { object: 'Math', property: 'random', message: 'Chance comes in as a seed.' },
      ],
    },
  },
  {
    // Identifiers are made outside the core, by client and server, and are in order of time.
    files: ['shared/src/study/ids.ts'],
    rules: { 'no-restricted-properties': 'off' },
  },
  {
    files: ['shared/src/**/*.spec.ts', 'shared/bench/**/*.ts'],
    rules: { 'no-restricted-globals': 'off', 'no-restricted-properties': 'off' },
  },

  {
    files: ['frontend/**/*.ts'],
    extends: [angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/component-selector': ['error', { type: 'element', prefix: 'dp', style: 'kebab-case' }],
      '@angular-eslint/directive-selector': ['error', { type: 'attribute', prefix: 'dp', style: 'camelCase' }],
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/prefer-signals': 'error',
      '@angular-eslint/prefer-output-readonly': 'error',
      '@angular-eslint/no-experimental': 'error',
      '@angular-eslint/no-developer-preview': 'error',
      '@angular-eslint/no-uncalled-signals': 'error',
    },
  },
  {
    files: ['frontend/**/*.html'],
    extends: [angular.configs.templateRecommended, angular.configs.templateAccessibility],
    rules: {
      // The content security policy blocks static style attributes; bindings go through the style API and are allowed.
      '@angular-eslint/template/no-inline-styles': ['error', { allowNgStyle: true, allowBindToStyle: true }],
      '@angular-eslint/template/prefer-control-flow': 'error',
      '@angular-eslint/template/button-has-type': 'error',
      '@angular-eslint/template/no-any': 'error',
    },
  },
);
