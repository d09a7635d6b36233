import presets from 'jest-preset-angular/presets/index.js';

const { createEsmPreset } = presets;

const swc = {
  '^.+\\.tsx?$': ['@swc/jest', { jsc: { target: 'es2022', parser: { syntax: 'typescript', decorators: true } }, module: { type: 'es6' } }],
};
const node = {
  testEnvironment: 'node',
  extensionsToTreatAsEsm: ['.ts'],
  transform: swc,
  modulePathIgnorePatterns: ['<rootDir>/dist', '<rootDir>/.data'],
};

/** unit: pure specs beside their file; web: Angular components; api, browser, faults: what needs a database, a bucket or a browser. */
export default {
  projects: [
    { ...node, displayName: 'unit', testMatch: ['<rootDir>/{compliance,shared,drizzle,server}/**/*.spec.ts'] },
    {
      ...createEsmPreset({ tsconfig: '<rootDir>/web/office/tsconfig.spec.json' }),
      displayName: 'web',
      testMatch: ['<rootDir>/web/**/*.spec.ts'],
      setupFilesAfterEnv: ['<rootDir>/test/support/web-setup.ts'],
      modulePathIgnorePatterns: ['<rootDir>/dist', '<rootDir>/.data'],
    },
    { ...node, displayName: 'api', setupFilesAfterEnv: ['<rootDir>/test/support/patience.ts'], testMatch: ['<rootDir>/test/api/**/*.spec.ts'] },
    { ...node, displayName: 'browser', testMatch: ['<rootDir>/test/browser/**/*.spec.ts'] },
    { ...node, displayName: 'faults', setupFilesAfterEnv: ['<rootDir>/test/support/patience.ts'], testMatch: ['<rootDir>/test/faults/**/*.spec.ts'] },
  ],
};
