import eslint from '@eslint/js';
import angular from 'angular-eslint';
import boundaries from 'eslint-plugin-boundaries';
import prettier from 'eslint-config-prettier';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import tseslint from 'typescript-eslint';

const root = import.meta.dirname;
const projects = readdirSync(root)
  .filter((file) => /^tsconfig\..+\.json$/.test(file))
  .map((file) => join(root, file));

/**
 * The parts of the project, by folder; the first that matches a file is the one it belongs to, so an inner
 * part stands before the part around it.
 */
const parts = [
  ['shared/units', 'shared/units'],
  ['shared/expressions', 'shared/expressions'],
  ['shared/contracts', 'shared/contracts'],
  ['shared/machines', 'shared/machines'],
  ['shared/engine', 'shared/engine'],
  ['server/platform', 'server/platform'],
  ['server/db', 'server/db'],
  ['server/policies', 'server/policies'],
  ['server/feature', 'server/features/*', ['feature']],
  ['server/jobs/worker', 'server/jobs/worker'],
  ['server/jobs', 'server/jobs'],
  ['server/commands', 'server/commands'],
  ['server', 'server'],
  ['app/shell', 'src/app/shell'],
  ['app/core', 'src/app/core'],
  ['app/ui', 'src/app/ui'],
  ['app/forms', 'src/app/forms'],
  ['app/engine/worker', 'src/app/engine/worker'],
  ['app/engine', 'src/app/engine'],
  ['app/feature', 'src/app/features/*', ['feature']],
  ['app', 'src'],
  ['tests', 'tests'],
];

const allShared = [
  'shared/units',
  'shared/expressions',
  'shared/contracts',
  'shared/machines',
  'shared/engine',
];
const sharedWithoutEngine = allShared.filter((part) => part !== 'shared/engine');
const angularPackages = ['@angular/*', 'rxjs', 'tslib'];

/**
 * Who may import what. `parts` are imported at any file, `faces` by their index.ts only, `packages` by name
 * ('*' for any), `node` is Node's own modules. Imports within one part need no entry.
 */
const importTable = [
  { from: 'shared/units' },
  { from: 'shared/expressions', parts: ['shared/units'] },
  { from: 'shared/contracts', parts: ['shared/units', 'shared/expressions'], packages: ['zod'] },
  { from: 'shared/machines', parts: ['shared/contracts', 'shared/expressions', 'shared/units'] },
  { from: 'shared/engine', parts: sharedWithoutEngine, packages: ['ml-matrix'] },

  { from: 'server/policies', parts: allShared },
  { from: 'server/platform', parts: allShared, packages: ['*'], node: true },
  { from: 'server/db', parts: ['server/platform', ...allShared], packages: ['*'], node: true },
  {
    from: 'server/feature',
    parts: ['server/platform', 'server/db', 'server/policies', ...sharedWithoutEngine],
    faces: ['server/jobs', 'server/feature'],
    packages: ['*'],
    node: true,
  },
  {
    from: 'server/jobs',
    parts: ['server/platform', 'server/db', ...sharedWithoutEngine],
    packages: ['*'],
    node: true,
  },
  {
    from: 'server/jobs/worker',
    parts: ['server/jobs', 'server/platform', 'server/db', ...allShared],
    packages: ['*'],
    node: true,
  },
  // The composition and the entry points. What entry points need of packages they get from the parts they
  // start; only the bundler is their own.
  {
    from: 'server',
    parts: ['server/platform', 'server/db', 'server/policies', 'server/jobs', ...allShared],
    faces: ['server/feature'],
    packages: ['*'],
    node: true,
  },
  {
    from: 'server/commands',
    parts: [
      'server',
      'server/platform',
      'server/db',
      'server/policies',
      'server/jobs',
      'server/jobs/worker',
      ...allShared,
    ],
    faces: ['server/feature'],
    packages: ['esbuild'],
    node: true,
  },

  { from: 'app/ui', parts: ['shared/units'], packages: [...angularPackages, 'd3', 'd3-*'] },
  { from: 'app/core', parts: ['app/ui', ...sharedWithoutEngine], packages: angularPackages },
  {
    from: 'app/forms',
    parts: ['app/ui', ...sharedWithoutEngine],
    packages: [...angularPackages, '@ngx-formly/*'],
  },
  { from: 'app/engine', parts: sharedWithoutEngine, packages: angularPackages },
  { from: 'app/engine/worker', parts: ['app/engine', ...allShared] },
  {
    from: 'app/feature',
    parts: ['app/ui', 'app/core', 'app/forms', 'app/engine', ...sharedWithoutEngine],
    packages: [...angularPackages, '@ngx-formly/*'],
  },
  { from: 'app/shell', parts: ['app/core', 'app/ui', ...sharedWithoutEngine], packages: angularPackages },
  {
    from: 'app',
    parts: [
      'app/shell',
      'app/core',
      'app/ui',
      'app/forms',
      'app/engine',
      'app/feature',
      ...sharedWithoutEngine,
    ],
    packages: [...angularPackages, '@ngx-formly/*'],
  },

  {
    from: 'tests',
    parts: parts.map(([part]) => part).filter((part) => part !== 'tests'),
    packages: ['*'],
    node: true,
  },
];

const importPolicies = importTable.flatMap(
  ({ from, parts = [], faces = [], packages = [], node = false }) => {
    const allowed = [
      ...(parts.length > 0 ? [{ element: { types: { anyOf: parts } } }] : []),
      ...faces.map((part) => ({ element: { type: part, fileInternalPath: 'index.ts' } })),
      ...(packages.length > 0 ? [{ module: { origin: 'external', source: packages } }] : []),
      ...(node ? [{ module: { origin: 'core' } }] : []),
    ];
    return allowed.map((to) => ({ from: { element: { type: from } }, allow: { to } }));
  },
);

const importRules = {
  plugins: { boundaries },
  settings: {
    'boundaries/root-path': root,
    'boundaries/elements': parts.map(([type, pattern, capture]) => ({
      type,
      pattern,
      partialMatch: false,
      ...(capture === undefined ? {} : { capture }),
    })),
    'boundaries/files': [{ category: 'spec', pattern: '**/*.spec.ts' }],
    'boundaries/dependency-nodes': ['import', 'export', 'dynamic-import', 'require'],
    'boundaries/legacy-templates': false,
    'import/resolver': { typescript: { project: projects, noWarnOnMultipleProjects: true } },
  },
  rules: {
    'boundaries/no-unknown-files': 'error',
    'boundaries/dependencies': [
      'error',
      {
        default: 'disallow',
        checkAllOrigins: true,
        checkUnknownLocals: true,
        message: 'the import table allows no import of "{{ dependency.source }}" in {{ from.element.type }}',
        policies: [
          ...importPolicies,
          {
            from: { file: { categories: 'spec' } },
            allow: {
              to: { module: { origin: 'external', source: ['vitest', 'fast-check', '@testing-library/*'] } },
            },
          },
        ],
      },
    ],
  },
};

/** Correctly rounded or exact on every machine; the constants are fixed by the language. */
const exactMath = [
  ...['sqrt', 'abs', 'min', 'max', 'floor', 'ceil', 'trunc', 'sign', 'imul', 'fround', 'clz32'],
  ...['PI', 'E', 'LN2', 'LN10', 'LOG2E', 'LOG10E', 'SQRT2', 'SQRT1_2'],
];
const sameDigits = 'its last digit differs between machines; use shared/expressions/elementary';

/** Every digit of an answer is the same in the browser, on the server and in a worker. */
const portableArithmetic = {
  'no-restricted-properties': ['error', { object: 'Math', allowProperties: exactMath, message: sameDigits }],
  'no-restricted-syntax': [
    'error',
    {
      selector: 'BinaryExpression[operator="**"], AssignmentExpression[operator="**="]',
      message: `Write the products out: of "**" ${sameDigits}.`,
    },
    {
      selector:
        ':not(MemberExpression) > Identifier[name="Math"], MemberExpression[computed=true] > Identifier[name="Math"]',
      message: 'Name the function of Math, so that it can be checked.',
    },
  ],
  'no-restricted-globals': [
    'error',
    { name: 'Date', message: 'The clock comes from the caller.' },
    { name: 'Intl', message: 'Its results differ between machines.' },
    { name: 'globalThis', message: 'Nothing of the surroundings is used here.' },
  ],
};

export default tseslint.config(
  { ignores: ['node_modules/', 'dist/', 'coverage/', '.data/'] },
  {
    linterOptions: { noInlineConfig: true, reportUnusedDisableDirectives: 'error' },
    languageOptions: { ecmaVersion: 2023, sourceType: 'module' },
  },
  eslint.configs.recommended,
  {
    rules: {
      eqeqeq: 'error',
      'no-eval': 'error',
      'no-implied-eval': 'error',
      'no-new-func': 'error',
    },
  },
  {
    files: ['**/*.ts'],
    extends: [tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { project: projects, tsconfigRootDir: root } },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      // Numbers in messages are the rule here, not the exception.
      '@typescript-eslint/restrict-template-expressions': [
        'error',
        { allowNumber: true, allowBoolean: true },
      ],
    },
  },
  {
    files: ['src/**/*.ts'],
    extends: [angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/component-selector': [
        'error',
        [
          { type: 'element', prefix: 'app', style: 'kebab-case' },
          { type: 'attribute', prefix: 'app', style: 'camelCase' },
        ],
      ],
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'app', style: 'camelCase' },
      ],
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/prefer-signals': 'error',
    },
  },
  {
    files: ['src/**/*.html'],
    extends: [angular.configs.templateRecommended, angular.configs.templateAccessibility],
    rules: {
      '@angular-eslint/template/eqeqeq': 'error',
      '@angular-eslint/template/button-has-type': 'error',
      // The content security policy refuses style attributes; [style.x] sets the property itself.
      '@angular-eslint/template/no-inline-styles': ['error', { allowNgStyle: false, allowBindToStyle: true }],
    },
  },
  { files: ['{src,server,shared,tests}/**/*.{ts,mjs}'], ...importRules },
  {
    files: ['shared/{engine,expressions}/**/*.ts'],
    ignores: ['**/*.spec.ts'],
    rules: portableArithmetic,
  },
  prettier,
);
