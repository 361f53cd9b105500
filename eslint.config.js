import js from '@eslint/js';
import queryPlugin from '@tanstack/eslint-plugin-query';
import prettier from 'eslint-config-prettier';
import checkFile from 'eslint-plugin-check-file';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

const noZonePlugin = {
  name: 'dayjs/plugin/timezone.js',
  message: 'Zones come from kernel/time.ts: the plugin varies with the zone of the process.',
};

export default tseslint.config(
  {
    ignores: ['**/node_modules/**', '.data/**', 'frontend/dist/**', 'coverage/**', 'pictures/**'],
  },
  js.configs.recommended,
  ...tseslint.configs.strictTypeChecked,
  {
    languageOptions: {
      parserOptions: {
        projectService: {
          allowDefaultProject: [
            '*.js',
            '*.cjs',
            'frontend/vite.config.ts',
            'backend/src/launch/*.mjs',
          ],
        },
        tsconfigRootDir: import.meta.dirname,
      },
    },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    plugins: { 'check-file': checkFile },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      // A new id takes its kind from where it goes.
      '@typescript-eslint/no-unnecessary-type-parameters': 'off',
      // A default that is written stands for the cases that it takes.
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      '@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true }],
      'check-file/filename-naming-convention': [
        'error',
        { '**/*.{ts,tsx,mjs}': 'KEBAB_CASE' },
        { ignoreMiddleExtensions: true },
      ],
      'no-restricted-imports': ['error', { paths: [noZonePlugin] }],
    },
  },
  {
    // TypeORM types its options as classes and takes plain objects.
    files: ['backend/src/database/entities/**'],
    rules: { '@typescript-eslint/no-unsafe-class-instance-assignment': 'off' },
  },
  {
    files: ['shared/src/domain/**'],
    rules: {
      'no-restricted-globals': [
        'error',
        { name: 'Date', message: 'A rule takes instants and days as facts (kernel/time.ts).' },
        { name: 'performance', message: 'A rule asks no clock.' },
        { name: 'setTimeout', message: 'A rule does not wait.' },
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'A rule knows no chance.' },
      ],
    },
  },
  {
    files: ['shared/src/kernel/**'],
    rules: {
      'no-restricted-syntax': [
        'error',
        {
          selector: "CallExpression[callee.name='dayjs']",
          message: 'Use dayjs.utc: bare dayjs() reads the zone of the process.',
        },
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'The clock is an argument.',
        },
        {
          selector: "MemberExpression[object.name='Date'][property.name='now']",
          message: 'The clock is an argument.',
        },
      ],
    },
  },
  {
    files: ['frontend/src/**'],
    plugins: { 'react-hooks': reactHooks },
    extends: [jsxA11y.flatConfigs.strict, ...queryPlugin.configs['flat/recommended']],
    rules: {
      ...reactHooks.configs.recommended.rules,
      'no-restricted-globals': [
        'error',
        { name: 'fetch', message: 'src/api/call.ts is the only place that fetches.' },
      ],
    },
  },
  { files: ['frontend/src/api/call.ts'], rules: { 'no-restricted-globals': 'off' } },
  {
    files: ['**/*.{js,cjs,mjs}'],
    extends: [tseslint.configs.disableTypeChecked],
    languageOptions: { globals: { process: 'readonly', module: 'readonly' } },
  },
  prettier,
);
