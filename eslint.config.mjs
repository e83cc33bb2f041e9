import astro from 'eslint-plugin-astro';
import { defineConfig } from 'eslint/config';
import tseslint from 'typescript-eslint';

export default defineConfig(
  { ignores: ['dist/', '.astro/', '.tareline/', 'drizzle/', 'node_modules/'] },
  ...tseslint.configs.strict,
  ...astro.configs.recommended,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/no-non-null-assertion': 'off',
      '@typescript-eslint/consistent-type-imports': ['error', { disallowTypeAnnotations: false }],
      'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
      'max-params': ['error', 3],
      eqeqeq: 'error',
      'prefer-const': 'error',
    },
  },
  { files: ['**/*.{tsx,astro}', 'tests/**'], rules: { 'max-lines-per-function': 'off' } },
  // rows of a table of cases arrive as positional parameters
  { files: ['tests/**'], rules: { 'max-params': 'off' } },
);
