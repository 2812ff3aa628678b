export default {
  displayName: 'backend',
  testEnvironment: 'node',
  testMatch: ['<rootDir>/src/**/*.spec.ts', '<rootDir>/../database/**/*.spec.ts'],
  roots: ['<rootDir>', '<rootDir>/../database'],
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/../shared/src/$1' },
  transform: { '^.+\\.ts$': ['ts-jest', { tsconfig: { target: 'ES2022', module: 'CommonJS', moduleResolution: 'node10', ignoreDeprecations: '5.0', esModuleInterop: true, isolatedModules: true, strict: true, experimentalDecorators: true, useDefineForClassFields: false }, diagnostics: false }] },
};
