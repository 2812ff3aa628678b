/** Backend and database tests: each file runs on a migrated PostgreSQL database of its own, see test/. */
export default {
  displayName: 'backend',
  testEnvironment: '<rootDir>/test/database-environment.ts',
  globalSetup: '<rootDir>/test/global-setup.mjs',
  globalTeardown: '<rootDir>/test/global-teardown.mjs',
  testMatch: ['<rootDir>/src/**/*.spec.ts', '<rootDir>/../database/**/*.spec.ts'],
  roots: ['<rootDir>', '<rootDir>/../database'],
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/../shared/src/$1' },
  transform: {
    '^.+\\.ts$': [
      'ts-jest',
      {
        diagnostics: false,
        tsconfig: {
          target: 'ES2022',
          module: 'CommonJS',
          moduleResolution: 'node10',
          ignoreDeprecations: '5.0',
          esModuleInterop: true,
          isolatedModules: true,
          strict: true,
          experimentalDecorators: true,
          useDefineForClassFields: false,
        },
      },
    ],
  },
};
