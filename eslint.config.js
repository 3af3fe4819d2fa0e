import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import { importX } from 'eslint-plugin-import-x';
import reactHooks from 'eslint-plugin-react-hooks';
import globals from 'globals';
import tseslint from 'typescript-eslint';

const zone = (target, from, message, except) => ({ target, from, message, ...(except ? { except } : {}) });

/** Folder rules; DEVELOPERS.md explains them in words. */
const zones = [
  zone('./shared', ['./server', './src', './tests', './e2e', './fixtures'], 'shared is pure: it imports zod and itself.'),
  zone('./src', ['./server', './tests', './e2e', './fixtures'], 'The browser never imports the server.'),
  zone('./server', ['./src', './tests', './e2e'], 'The server never imports the client.'),
  zone('./shared/second', './shared/calc', 'The second derivation shares nothing with the first.'),
  zone('./src', './shared/second', 'The second derivation runs on the server only.'),
  zone('./src/components', ['./src/features', './src/app'], 'Components know no feature.'),
  zone('./src/lib', ['./src/features', './src/app', './src/components'], 'lib is the lowest layer of the client.'),
  zone('./src/features', './src/app', 'Features do not know the app that mounts them.'),
];

const bannedSyntax = [
  { selector: "MemberExpression[object.property.name='coerce']", message: "z.coerce turns '' into 0: use decimalInput()." },
];

const stateSyntax = {
  selector: "BinaryExpression[operator=/^[!=]==$/] > MemberExpression[property.name='state']",
  message: 'Ask shared/orders (decide, isLive, …): nothing else compares a state.',
};

const size = (file, fn) => ({
  'max-lines': ['error', { max: file, skipBlankLines: true, skipComments: true }],
  'max-lines-per-function': ['error', { max: fn, skipBlankLines: true, skipComments: true }],
});

export default tseslint.config(
  { ignores: ['dist', '.state', 'node_modules', 'migrations', 'test-results', 'playwright-report', 'coverage'] },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx}'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    plugins: { 'import-x': importX },
    settings: { 'import-x/resolver': { typescript: true } },
    rules: {
      ...size(300, 60),
      complexity: ['error', 12],
      'max-depth': ['error', 3],
      'max-params': ['error', 5],
      'no-restricted-syntax': ['error', ...bannedSyntax, stateSyntax],
      'import-x/no-cycle': 'error',
      'import-x/no-restricted-paths': ['error', { zones, basePath: import.meta.dirname }],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false, arguments: false } }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-namespace': ['error', { allowDeclarations: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
    },
  },
  { files: ['**/*.tsx'], plugins: { 'react-hooks': reactHooks }, rules: { 'react-hooks/rules-of-hooks': 'error', 'react-hooks/exhaustive-deps': 'error', complexity: ['error', 16], ...size(300, 120) } },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-imports': ['error', { patterns: [{ regex: '^(?!\\.|@shared/|zod$)', message: 'shared imports zod and itself.' }] }],
      'no-restricted-globals': ['error', 'Date', 'process', 'fetch', 'window', 'console'],
    },
  },
  { files: ['shared/calc/**/*.ts'], rules: { ...size(150, 40) } },
  // drawing takes coordinates
  { files: ['server/documents/**/*.ts'], rules: { 'max-params': ['error', 6] } },
  { files: ['shared/time.ts'], rules: { 'no-restricted-globals': 'off' } },
  { files: ['shared/orders/**/*.ts'], rules: { 'no-restricted-syntax': ['error', ...bannedSyntax] } },
  {
    files: ['server/**/*.ts'],
    ignores: ['server/db/**'],
    rules: {
      'no-restricted-imports': ['error', { paths: [{ name: 'postgres', message: 'Only server/db sees the driver.' }] }],
      'no-restricted-properties': ['error', { object: 'sql', property: 'raw', message: 'Parameters only; raw SQL lives in server/db.' }],
    },
  },
  {
    files: ['tests/**/*.{ts,tsx}', 'e2e/**/*.ts'],
    rules: {
      ...size(400, 400),
      complexity: 'off',
      'max-params': 'off',
      'no-restricted-syntax': ['error', ...bannedSyntax],
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
      // fixtures in Playwright have empty patterns
      'no-empty-pattern': 'off',
    },
  },
  { files: ['**/*.{js,mjs}'], languageOptions: { globals: globals.node } },
  { files: ['src/public/**/*.js'], languageOptions: { globals: globals.browser } },
  prettier,
);
