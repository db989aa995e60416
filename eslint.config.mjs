import js from '@eslint/js';
import expo from 'eslint-config-expo/flat.js';
import tseslint from 'typescript-eslint';

/** Pure code and services take the time and chance from their caller, so that an answer can be had again. */
const takenFromCaller = {
  'no-restricted-properties': [
    'error',
    { object: 'Date', property: 'now', message: 'Take the time from the caller.' },
    { object: 'Math', property: 'random', message: 'Take a seeded generator from the caller.' },
  ],
  'no-restricted-syntax': [
    'error',
    {
      selector: "NewExpression[callee.name='Date'][arguments.length=0]",
      message: 'Take the time from the caller.',
    },
  ],
};

const everyFile = {
  eqeqeq: ['error', 'always', { null: 'ignore' }],
  'max-params': ['error', 3],
  'no-console': 'error',
};

const typed = {
  '@typescript-eslint/no-floating-promises': 'error',
  '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
  '@typescript-eslint/await-thenable': 'error',
  '@typescript-eslint/switch-exhaustiveness-check': ['error', { considerDefaultExhaustiveForUnions: true }],
  '@typescript-eslint/consistent-type-imports': ['error', { disallowTypeAnnotations: false }],
  '@typescript-eslint/no-explicit-any': 'error',
  '@typescript-eslint/no-unused-vars': [
    'error',
    { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
  ],
};

/** The client's build leaves these out, for every first visit would pay for them: see metro.config.js. */
const windowedLists = {
  'no-restricted-imports': [
    'error',
    {
      paths: [
        {
          name: 'react-native',
          importNames: ['FlatList', 'SectionList', 'VirtualizedList'],
          message: 'The web build leaves windowed lists out: use a List or a Table.',
        },
        {
          name: 'expo-router',
          importNames: ['Tabs'],
          message: 'The web build leaves the router’s tab bar out: use Places.',
        },
      ],
    },
  ],
};

/** Expo's own rules for the client alone; its plugin object gives way to the one used everywhere. */
const client = expo.map((block) => ({
  ...block,
  files: ['apps/mobile/**/*.{ts,tsx,js}'],
  ...(block.plugins?.['@typescript-eslint']
    ? { plugins: { ...block.plugins, '@typescript-eslint': tseslint.plugin } }
    : {}),
}));

export default tseslint.config(
  {
    ignores: [
      '**/node_modules/',
      '**/dist/',
      '**/dist-next/',
      '**/.expo/',
      '.data/',
      '**/fixtures/',
      'apps/mobile/expo-env.d.ts',
    ],
  },
  { linterOptions: { reportUnusedDisableDirectives: 'error' } },
  { files: ['**/*.{ts,tsx,mjs,js}'], ...js.configs.recommended },
  ...client,
  // The compiler resolves the client's imports, and a schema shares its name with its type.
  {
    files: ['apps/mobile/**/*.{ts,tsx}'],
    rules: { 'import/no-unresolved': 'off', '@typescript-eslint/no-redeclare': 'off', ...windowedLists },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [tseslint.configs.recommended],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: { ...everyFile, ...typed, 'no-undef': 'off' },
  },
  {
    files: ['**/*.{mjs,js}'],
    rules: {
      ...everyFile,
      'no-undef': 'off',
      'no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
    },
  },
  {
    files: ['**/*.test.ts', '**/*.test.tsx', 'tests/**'],
    rules: { 'max-params': 'off', 'no-empty-pattern': ['error', { allowObjectPatternsAsParameters: true }] },
  },
  // Express knows an error handler by its four parameters; Metro reads its settings as CommonJS.
  { files: ['apps/api/src/http/problem.ts'], rules: { 'max-params': ['error', 4] } },
  { files: ['apps/mobile/*.config.js'], rules: { '@typescript-eslint/no-require-imports': 'off' } },
  {
    files: ['packages/shared/src/**/*.ts', 'apps/api/src/*/**/*.ts'],
    ignores: ['apps/api/src/{http,jobs,demo}/**', '**/*.test.ts', '**/*.worker.ts'],
    rules: takenFromCaller,
  },
);
