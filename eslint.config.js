import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

export default tseslint.config(
  { ignores: ['**/node_modules/', '**/dist/', '.data/', 'schema/migrations/'] },
  ...tseslint.configs.recommended,
  {
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/consistent-type-imports': 'error',
      'no-console': 'error',
      eqeqeq: ['error', 'always', { null: 'ignore' }],
    },
  },
  // Nest reads constructor parameter types at run time, so its imports must stay values.
  { files: ['service/src/**/*.ts'], rules: { '@typescript-eslint/consistent-type-imports': 'off' } },
  { files: ['tests/**', 'testdata/**', '**/*.mjs', '**/*.js'], rules: { 'no-console': 'off' } },
  { files: ['app/src/**'], ...reactHooks.configs.flat['recommended-latest'] },
);
