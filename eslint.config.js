import js from '@eslint/js';
import { defineConfig } from 'eslint/config';
import prettier from 'eslint-config-prettier';
import vue from 'eslint-plugin-vue';
import vueA11y from 'eslint-plugin-vuejs-accessibility';
import globals from 'globals';
import tseslint from 'typescript-eslint';
import { layerRules } from './eslint.layers.js';

const code = ['**/*.{js,mjs,ts,vue}'];

export default defineConfig(
  { ignores: ['node_modules/', 'dist/', '.quasar/', '.data/', 'coverage/', 'src-pwa/'] },
  {
    files: code,
    extends: [
      js.configs.recommended,
      ...tseslint.configs.recommended,
      ...tseslint.configs.stylistic,
      ...vue.configs['flat/recommended'],
      ...vueA11y.configs['flat/recommended'],
      prettier,
    ],
    languageOptions: { globals: globals.es2023 },
    rules: {
      eqeqeq: 'error',
      'no-console': 'error',
      'max-lines': ['error', { max: 400 }],
      'no-undef': 'off',
      '@typescript-eslint/consistent-type-definitions': 'off',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_' }],
      '@typescript-eslint/no-import-type-side-effects': 'error',
      '@typescript-eslint/no-empty-function': 'off',
      'vue/block-lang': ['error', { script: { lang: 'ts' }, style: { lang: 'scss' } }],
      'vue/component-api-style': ['error', ['script-setup']],
      'vue/component-name-in-template-casing': ['error', 'PascalCase'],
      'vue/define-props-declaration': ['error', 'type-based'],
      'vue/no-static-inline-styles': 'error',
      'vue/no-v-html': 'error',
      'vue/require-default-prop': 'off',
      'vue/multi-word-component-names': 'off',
      'vue/attributes-order': 'off',
      // A wrapping label is enough: Quasar's fields are labelled by their own `label`.
      'vuejs-accessibility/label-has-for': ['error', { required: { some: ['nesting', 'id'] } }],
    },
  },
  {
    files: ['**/*.vue'],
    languageOptions: { parserOptions: { parser: tseslint.parser } },
  },
  {
    files: ['src/**/*.{ts,vue}', 'tests/src/**/*.ts'],
    languageOptions: { globals: globals.browser },
  },
  {
    files: ['server/**', 'seeds/**', 'tests/**', '*.{js,ts}'],
    languageOptions: { globals: globals.node },
  },
  {
    // A forgotten await on the server is a write outside its transaction.
    files: ['server/**/*.ts', 'seeds/**/*.ts'],
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      '@typescript-eslint/no-floating-promises': 'error',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: false }],
      '@typescript-eslint/await-thenable': 'error',
    },
  },
  {
    // Scripts that a person runs talk to the terminal.
    files: ['server/launcher/**', 'tests/bench/**', 'tests/support/**'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['**/data/**', 'server/migrations/**', 'seeds/**'],
    rules: { 'max-lines': 'off' },
  },
  ...layerRules,
);
