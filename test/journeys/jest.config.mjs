/** Browser journeys against the built product; the test command starts them one file after the other. */
export default {
  rootDir: '../..',
  displayName: 'journeys',
  testEnvironment: 'node',
  testMatch: ['<rootDir>/test/journeys/**/*.spec.ts'],
  transform: {
    '^.+\\.m?ts$': ['@swc/jest', { jsc: { target: 'es2022', parser: { syntax: 'typescript' } } }],
  },
  moduleNameMapper: { '^@tollgate/([^/]+)$': '<rootDir>/libs/$1/src/index.ts' },
  testTimeout: 60_000,
};
