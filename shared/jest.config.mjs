export default {
  displayName: 'shared',
  testEnvironment: 'node',
  testMatch: ['<rootDir>/src/**/*.spec.ts'],
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/src/$1' },
  transform: {
    '^.+\\.ts$': [
      'ts-jest',
      {
        tsconfig: {
          target: 'ES2022',
          module: 'CommonJS',
          moduleResolution: 'node10',
          ignoreDeprecations: '5.0',
          esModuleInterop: true,
          isolatedModules: true,
          strict: true,
        },
        diagnostics: false,
      },
    ],
  },
};
