import presets from 'jest-preset-angular/presets/index.js';
export default {
  ...presets.createCjsPreset({ tsconfig: '<rootDir>/tsconfig.spec.json' }),
  displayName: 'frontend',
  rootDir: import.meta.dirname,
  testMatch: ['<rootDir>/src/**/*.spec.ts'],
  setupFilesAfterEnv: ['<rootDir>/src/testing/setup-jest.ts'],
  moduleNameMapper: { '^@shared/(.*)$': '<rootDir>/../shared/src/$1' },
};
