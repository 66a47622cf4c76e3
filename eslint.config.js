import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import ts from 'typescript-eslint';

export default ts.config(
  { ignores: ['dist/', 'release/', 'coverage/', 'test-results/'] },
  js.configs.recommended,
  ...ts.configs.recommended,
  ...svelte.configs.recommended,
  prettier,
  ...svelte.configs.prettier,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  // What writes to a terminal.
  { files: ['src-main/**', 'test/**'], rules: { 'no-console': 'off' }, languageOptions: { globals: globals.node } },
  { files: ['src-renderer/**'], languageOptions: { globals: globals.browser } },
  {
    files: ['**/*.svelte', '**/*.svelte.ts'],
    languageOptions: { parserOptions: { parser: ts.parser } },
    rules: {
      'svelte/no-at-html-tags': 'error',
      // A static style attribute breaks the page's content security policy; style:left={…} does not.
      'no-restricted-syntax': [
        'error',
        { selector: 'SvelteAttribute[key.name="style"][value.length=1] > SvelteLiteral', message: 'Write a class or style:…={…} instead.' },
      ],
      // TypeScript knows its globals.
      'no-undef': 'off',
    },
  },
);
