import nextConfig from 'eslint-config-next/core-web-vitals';
import typescriptConfig from 'eslint-config-next/typescript';
import { importDirections } from './lib/local/lint/import-directions.mjs';

const config = [
  {
    ignores: [
      '.next/**',
      '.next-b/**',
      '.local/**',
      'next-env.d.ts',
      'public/**',
      'test-results/**',
      'tests/fixtures/**',
    ],
  },
  ...nextConfig,
  ...typescriptConfig,
  {
    // A comment that switches a rule off has no effect.
    linterOptions: { noInlineConfig: true, reportUnusedDisableDirectives: 'off' },
  },
  {
    files: ['**/*.{ts,tsx,mjs}'],
    plugins: { stilewright: { rules: { 'import-directions': importDirections } } },
    rules: { 'stilewright/import-directions': ['error', import.meta.dirname] },
  },
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/ban-ts-comment': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', ignoreRestSiblings: true }],
      '@typescript-eslint/no-unused-expressions': 'error',
      eqeqeq: ['error', 'always'],
    },
  },
  {
    // Cameras, lights and renderers are objects of three, which are changed in place.
    files: ['components/scene/**'],
    rules: { 'react-hooks/immutability': 'off' },
  },
  {
    // The browser tests' fixtures are handed on by a function called `use`, which is no hook.
    files: ['tests/**', 'lib/local/**'],
    rules: { 'react-hooks/rules-of-hooks': 'off' },
  },
  {
    files: ['lib/engine/**', 'lib/record/**'],
    rules: {
      'no-console': 'error',
      'no-restricted-globals': [
        'error',
        'process',
        'window',
        'document',
        'fetch',
        'setTimeout',
        'setInterval',
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'The same input gives the same result.' },
        { object: 'Date', property: 'now', message: 'The moment comes in as an argument.' },
      ],
    },
  },
];

export default config;
