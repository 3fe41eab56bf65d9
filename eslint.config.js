/** Lint: Expo's rules, the house caps on size, and the ban on raw primitives outside the wrappers. */
const expo = require('eslint-config-expo/flat');

const rawPrimitives = {
  name: 'react-native',
  importNames: ['Text', 'TextInput', 'Pressable', 'Modal', 'Button', 'TouchableOpacity'],
  message: 'Use the wrappers in shared/client/components.',
};

module.exports = [
  ...expo,
  { ignores: ['node_modules/**', 'dist/**', 'data/**', '.expo/**', 'coverage/**', 'public/**'] },
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
      'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
      'max-params': ['error', 3],
      complexity: ['error', 10],
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/consistent-type-imports': [
        'error',
        { prefer: 'type-imports', fixStyle: 'separate-type-imports' },
      ],
      'no-console': 'error',
      eqeqeq: 'error',
    },
  },
  {
    files: ['*.js', '*.cjs'],
    languageOptions: {
      globals: { __dirname: 'readonly', module: 'writable', require: 'readonly', process: 'readonly' },
    },
  },
  // Screens and components are mostly markup; tests are lists of cases.
  {
    files: ['shared/client/**/*.tsx'],
    rules: { 'max-lines-per-function': ['error', { max: 110, skipBlankLines: true, skipComments: true }] },
  },
  {
    files: ['tests/**/*.{ts,tsx}'],
    rules: {
      'max-lines-per-function': 'off',
      // A row of a table of cases has as many columns as it needs.
      'max-params': 'off',
      'max-lines': ['error', { max: 600, skipBlankLines: true, skipComments: true }],
    },
  },
  { files: ['tests/bench/**', 'server/index.ts', 'server/cli/**'], rules: { 'no-console': 'off' } },
  {
    files: ['app/**/*.tsx', 'shared/client/**/*.{ts,tsx}'],
    ignores: ['shared/client/components/**'],
    rules: { 'no-restricted-imports': ['error', { paths: [rawPrimitives] }] },
  },
];
