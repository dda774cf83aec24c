/** Five projects, one a tier: unit beside the code, data on real PostgreSQL, api over HTTP, reliability, browser. */
const swc = {
  '^.+\\.(t|j|mj)sx?$': [
    '@swc/jest',
    {
      jsc: {
        parser: { syntax: 'typescript', tsx: true, decorators: true },
        transform: { legacyDecorator: true, decoratorMetadata: true, react: { runtime: 'automatic' } },
        keepClassNames: true,
        target: 'es2022',
      },
      module: { type: 'commonjs' },
    },
  ],
};
const libs = ['baseline', 'control', 'scoring', 'workbook', 'contracts', 'data', 'mail', 'platform'];
const base = {
  rootDir: __dirname,
  roots: ['apps', 'database', 'libs', 'test', 'tools'].map((folder) => `<rootDir>/${folder}`),
  testEnvironment: 'node',
  setupFilesAfterEnv: ['<rootDir>/test/support/patience.cjs'],
  transform: swc,
  moduleNameMapper: Object.fromEntries(libs.map((name) => [`^@app/${name}$`, `<rootDir>/libs/${name}/src/index.ts`])),
};
const project = (displayName, testMatch, extra = {}) => ({ ...base, displayName, testMatch, ...extra });
const database = {
  globalSetup: '<rootDir>/test/support/global-setup.cjs',
  globalTeardown: '<rootDir>/test/support/global-teardown.cjs',
};

module.exports = {
  projects: [
    project(
      'unit',
      ['<rootDir>/libs/**/*.spec.ts', '<rootDir>/apps/**/*.spec.{ts,tsx}', '<rootDir>/tools/**/*.spec.ts'],
      {
        testPathIgnorePatterns: ['/node_modules/', '<rootDir>/libs/data/', '<rootDir>/apps/worker/'],
      },
    ),
    project('data', ['<rootDir>/{libs/data,apps/worker,test/migrations}/**/*.spec.ts'], database),
    project('api', ['<rootDir>/test/api/**/*.spec.ts'], database),
    project('reliability', ['<rootDir>/test/reliability/**/*.spec.ts'], database),
    project('browser', ['<rootDir>/test/browser/tests/**/*.spec.ts'], database),
  ],
};
