/** Three projects: libs and server on Node with swc, the client on jsdom with Angular's own compiler. */
const alias = { '^@tollgate/([^/]+)$': '<rootDir>/libs/$1/src/index.ts' };
const swc = {
  '^.+\\.m?ts$': [
    '@swc/jest',
    { jsc: { target: 'es2022', parser: { syntax: 'typescript', decorators: true } } },
  ],
};
const node = { testEnvironment: 'node', transform: swc, moduleNameMapper: alias };

export default {
  projects: [
    { ...node, displayName: 'libs', testMatch: ['<rootDir>/{libs,apps/channel}/**/*.spec.ts'] },
    {
      ...node,
      displayName: 'server',
      testMatch: ['<rootDir>/{server,test/api,test/faults,test/reference,test/structure,tools}/**/*.spec.ts'],
    },
    {
      displayName: 'web',
      preset: 'jest-preset-angular',
      testMatch: ['<rootDir>/apps/web/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/apps/web/src/testing/setup-jest.ts'],
      moduleNameMapper: alias,
      transform: {
        '^.+\\.(ts|js|mjs|html|svg)$': [
          'jest-preset-angular',
          { tsconfig: '<rootDir>/apps/web/tsconfig.spec.json', stringifyContentPathRegex: '\\.(html|svg)$' },
        ],
      },
      transformIgnorePatterns: ['node_modules/(?!.*\\.mjs$)'],
    },
  ],
};
