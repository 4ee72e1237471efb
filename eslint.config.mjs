import coreWebVitals from 'eslint-config-next/core-web-vitals';
import tseslint from 'typescript-eslint';
import layers from './tests/support/layers/eslint-plugin.mjs';

const SOURCES = ['**/*.ts', '**/*.tsx'];
/** Layers that know no clock, no chance and no environment; the same as `pure` in tests/support/layers/layers.json. */
const PURE = ['lib/{theory,score,harmony,marking,partwriting,handout}/**', 'lib/{result,errors,vocabularies}.ts'];

export default tseslint.config(
  { ignores: ['node_modules/', '.next/', '.next-*/', '.data/', 'coverage/', 'test-results/', 'playwright-report/', '**/*.bundle.mjs', '**/*.d.ts', '**/*.d.mts'] },
  { linterOptions: { noInlineConfig: true, reportUnusedDisableDirectives: 'error' } },
  ...coreWebVitals,
  ...tseslint.configs.strict.map((config) => ({ ...config, files: SOURCES })),
  {
    files: SOURCES,
    plugins: { understave: layers },
    rules: {
      'understave/imports': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', caughtErrors: 'all' }],
      'max-lines': ['error', 400],
      'max-lines-per-function': ['error', { max: 80 }],
      'no-console': 'error',
      'no-restricted-syntax': [
        'error',
        { selector: "MemberExpression[object.name='process'][property.name='env']", message: 'Only lib/config.ts reads the environment.' },
      ],
      eqeqeq: 'error',
    },
  },
  {
    // Rules that need types, kept to those that find bugs no test would: a promise that nobody waits for.
    files: SOURCES,
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
    },
  },
  // Arithmetic over arrays whose lengths are fixed: an index is in range by construction, and a check would hide that.
  { files: ['lib/{theory,score,harmony,marking,partwriting,handout}/**', 'tests/**'], rules: { '@typescript-eslint/no-non-null-assertion': 'off' } },
  { files: ['components/**/*.tsx'], rules: { 'max-lines': ['error', 200] } },
  {
    files: PURE,
    rules: {
      'no-restricted-properties': [
        'error',
        { object: 'Date', property: 'now', message: 'The domain knows no clock: pass the time in.' },
        { object: 'Math', property: 'random', message: 'The domain is deterministic: pass chance in.' },
      ],
      'no-restricted-globals': ['error', 'process', 'window', 'document', 'localStorage', 'fetch', 'setTimeout', 'crypto'],
    },
  },
  // It finds its fonts and its engraver below the working directory.
  { files: ['lib/handout/**'], rules: { 'no-restricted-globals': 'off' } },
  // Who may read the environment: the one reader, Next's own switch, and what runs before or outside the app.
  {
    files: ['lib/config.ts', 'instrumentation.ts', 'drizzle.config.ts', 'playwright.config.ts', 'tests/**'],
    rules: { 'no-restricted-syntax': 'off' },
  },
  { files: ['lib/cli/**', 'db/seed/**', 'tests/**'], rules: { 'no-console': 'off' } },
  // A describe is one long function by nature.
  { files: ['tests/**'], rules: { 'max-lines-per-function': 'off' } },
);
