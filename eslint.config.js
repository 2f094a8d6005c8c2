import angular from 'angular-eslint';
import drizzle from 'eslint-plugin-drizzle';
import { createTypeScriptImportResolver } from 'eslint-import-resolver-typescript';
import importX from 'eslint-plugin-import-x';
import tseslint from 'typescript-eslint';

/** A ban on imports that cross an arrow of the layout, with the way to go instead. */
const wall = (...patterns) => ({
  'no-restricted-imports': ['error', { patterns }],
});
const noApi = {
  // Three levels up from a page area is apps/; `core/api` inside the web app is its own.
  regex: '(apps/api/|^(\\.\\./){3,}api/|^@stillstroke/db/)',
  message:
    'The web app knows the server only through its contract: import the schema or type from @stillstroke/contract/*.',
};
const noWeb = {
  group: ['**/apps/web/**', '@angular/*', 'konva', 'konva/*'],
  message:
    'Server and libraries do not know the web app: move what both need to libs/contract or libs/geometry.',
};
const noOtherLib = (allowed) => ({
  regex: `^@stillstroke/(?!${allowed}/)`,
  message: 'A library imports nothing of ours but itself: pass the value in, or move the code to its caller.',
});
const noDeepLib = {
  regex: '\\.\\./.*libs/',
  message: 'Import libraries by name: @stillstroke/<library>/<file>.',
};

export default tseslint.config(
  { ignores: ['dist/**', 'data/**', '.angular/**', 'node_modules/**', 'test-results/**', 'coverage/**'] },
  {
    files: ['**/*.ts'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    plugins: { 'import-x': importX, drizzle },
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    settings: {
      'import-x/resolver-next': [
        createTypeScriptImportResolver({ project: ['tsconfig.json'], noWarnOnMultipleProjects: true }),
      ],
    },
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
      'no-console': ['error', { allow: ['error'] }],
    },
  },
  {
    files: ['apps/web/src/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/component-selector': ['error', { type: 'element', prefix: 'st', style: 'kebab-case' }],
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'st', style: 'camelCase' },
      ],
      '@typescript-eslint/unbound-method': ['error', { ignoreStatic: true }],
      ...wall(noApi, noDeepLib),
      'no-restricted-globals': [
        'error',
        { name: 'fetch', message: 'Use the data-access file of your feature (HttpClient).' },
        { name: 'localStorage', message: 'Inject a store from core/ instead.' },
      ],
    },
  },
  {
    files: ['apps/web/src/app/playback/**/*.ts'],
    ignores: ['**/*.spec.ts'],
    rules: {
      'no-restricted-globals': 'off',
      ...wall(noApi, noDeepLib, {
        group: ['@angular/*'],
        message: 'playback/ has no Angular in it: wrap it in desk/ and keep the module plain.',
      }),
    },
  },
  {
    files: ['apps/web/src/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
  },
  {
    files: ['apps/api/**/*.ts'],
    rules: {
      ...wall(noWeb, noDeepLib),
      'drizzle/enforce-delete-with-where': ['error', { drizzleObjectName: ['db', 'tx'] }],
      'drizzle/enforce-update-with-where': ['error', { drizzleObjectName: ['db', 'tx'] }],
    },
  },
  { files: ['libs/geometry/**/*.ts'], rules: wall(noWeb, noOtherLib('geometry')) },
  { files: ['libs/clip-index/**/*.ts'], rules: wall(noWeb, noOtherLib('clip-index')) },
  {
    files: ['libs/contract/**/*.ts'],
    rules: {
      ...wall(noWeb, noOtherLib('contract')),
      'no-restricted-syntax': [
        'error',
        {
          selector: "ImportDeclaration[source.value='zod'] > ImportSpecifier",
          message:
            "Write import * as z from 'zod': the named object brings every language of zod into the first page.",
        },
      ],
    },
  },
  { files: ['libs/db/**/*.ts'], rules: wall(noWeb, noOtherLib('db')) },
  {
    files: ['**/*.spec.ts', 'test/**/*.ts', 'scripts/**/*.ts'],
    rules: {
      'no-console': 'off',
      'max-lines': ['error', { max: 600, skipBlankLines: true, skipComments: true }],
    },
  },
);
