import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

/** Who may import whom (DEVELOPERS.md, "Parts"). Everything not listed is refused with the sentence given. */
const layers = {
  quantities: [],
  geometry: [],
  network: [],
  contracts: ['quantities'],
  touchstone: ['network'],
  lines: ['network'],
  elements: ['network', 'lines', 'touchstone', 'geometry', 'contracts'],
  masks: ['network', 'contracts'],
  budget: ['quantities', 'contracts', 'network', 'touchstone', 'lines', 'geometry', 'elements', 'masks'],
};
const everyLib = Object.keys(layers);
const deepImport = {
  group: ['@tollgate/*/*', '**/libs/*/src/**'],
  message: 'A library is entered by its index.ts only: import from @tollgate/<name>.',
};

function only(files, allowed, who, extra = []) {
  const refused = everyLib.filter((lib) => !allowed.includes(lib));
  const patterns = [deepImport, ...extra];
  if (refused.length) {
    patterns.push({
      group: refused.map((lib) => `@tollgate/${lib}`),
      message: `${who} may import only ${allowed.length ? allowed.join(', ') : 'nothing of ours'}: imports run in one direction.`,
    });
  }
  return { files, rules: { 'no-restricted-imports': ['error', { patterns }] } };
}

const nodeBuiltIns = {
  group: ['node:*', 'fs', 'path', 'crypto', 'express', 'sequelize', 'mariadb'],
  message: 'Libraries run in a browser too: no Node built-in, no HTTP, no database.',
};

export default tseslint.config(
  { ignores: ['node_modules/**', 'dist/**', 'dist-test/**', '.angular/**', '.data*/**', 'coverage/**'] },
  {
    files: ['**/*.ts'],
    extends: [...tseslint.configs.recommendedTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: import.meta.dirname } },
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      'no-console': 'error',
      eqeqeq: 'error',
      'max-lines': ['error', { max: 400, skipBlankLines: true, skipComments: true }],
      'no-restricted-syntax': [
        'error',
        { selector: 'TSEnumDeclaration', message: 'Use a const object and a derived type.' },
      ],
    },
  },
  ...everyLib.map((lib) => only([`libs/${lib}/**/*.ts`], [...layers[lib]], `libs/${lib}`, [nodeBuiltIns])),
  only(['apps/web/**/*.ts'], ['contracts', 'quantities', 'geometry'], 'The client'),
  only(['apps/channel/**/*.ts'], ['contracts', 'budget', 'touchstone'], 'The command line'),
  {
    files: ['apps/web/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/component-selector': ['error', { type: 'element', prefix: 'tg', style: 'kebab-case' }],
      '@angular-eslint/directive-selector': [
        'error',
        { type: 'attribute', prefix: 'tg', style: 'camelCase' },
      ],
    },
  },
  {
    files: ['apps/web/**/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
  },
  {
    files: ['libs/**/*.spec.ts', 'libs/**/reference/**/*.ts'],
    rules: { 'no-restricted-imports': 'off' },
  },
  {
    files: ['**/*.spec.ts', 'test/**/*.ts'],
    rules: {
      '@typescript-eslint/no-unsafe-assignment': 'off',
      '@typescript-eslint/no-unsafe-member-access': 'off',
      '@typescript-eslint/no-unsafe-argument': 'off',
      '@typescript-eslint/no-unsafe-call': 'off',
      '@typescript-eslint/no-unsafe-return': 'off',
    },
  },
  { files: ['tools/**', 'apps/channel/**'], rules: { 'no-console': 'off' } },
);
