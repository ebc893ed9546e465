import js from '@eslint/js';
import tseslint from 'typescript-eslint';

const noDefaultExport = {
  selector: 'ExportDefaultDeclaration',
  message: 'Export by name.',
};

const globalsOf = (...names) => Object.fromEntries(names.map((name) => [name, 'readonly']));

export default tseslint.config(
  { ignores: ['.build/', 'node_modules/'] },
  js.configs.recommended,
  ...tseslint.configs.recommendedTypeChecked,
  {
    languageOptions: {
      parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname },
    },
    rules: {
      eqeqeq: 'error',
      'no-eval': 'error',
      'no-implied-eval': 'error',
      'no-new-func': 'error',
      'prefer-const': 'error',
      'no-restricted-syntax': ['error', noDefaultExport],
    },
  },
  {
    // The host passes and takes untyped ranges; nowhere else is `any` allowed.
    files: ['addin/functions/functions.ts'],
    rules: { '@typescript-eslint/no-explicit-any': 'off' },
  },
  {
    // Tool configurations and the scripts run as plain JavaScript.
    files: ['**/*.mjs'],
    extends: [tseslint.configs.disableTypeChecked],
    languageOptions: {
      globals: globalsOf('console', 'process', 'URL', 'Buffer', 'performance', 'setTimeout'),
    },
    rules: { 'no-restricted-syntax': 'off' },
  },
);
