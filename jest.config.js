/**
 * Two worlds, two compilers: the server and the pure code run in Node under swc (it keeps Sequelize's
 * `declare` fields, which Babel's Expo preset cannot); the client runs in a DOM under Expo's preset.
 */
const alias = { '^@/(.*)$': '<rootDir>/$1' };

const nodeProject = (displayName, folder) => ({
  displayName,
  rootDir: __dirname,
  testEnvironment: 'node',
  testMatch: [`<rootDir>/tests/${folder}/**/*.test.ts`],
  moduleNameMapper: alias,
  transform: {
    '^.+\\.(t|j)sx?$': [
      '@swc/jest',
      { jsc: { target: 'es2022', parser: { syntax: 'typescript', tsx: false, decorators: false } } },
    ],
  },
});

/** The d3 packages export ES modules, which jest does not load; their bundles are the same code. */
const d3Bundles = { '^(d3-[a-z-]+)$': '<rootDir>/node_modules/$1/dist/$1.js' };

module.exports = {
  projects: [
    nodeProject('formulas', 'formulas'),
    nodeProject('contract', 'contract'),
    nodeProject('clinical', 'clinical'),
    { ...nodeProject('server', 'server'), setupFiles: ['<rootDir>/tests/support/server-env.ts'] },
    {
      displayName: 'client',
      preset: 'jest-expo/web',
      rootDir: __dirname,
      testMatch: ['<rootDir>/tests/client/**/*.test.ts?(x)'],
      moduleNameMapper: { ...alias, ...d3Bundles },
      setupFilesAfterEnv: ['<rootDir>/tests/support/client-setup.ts'],
    },
  ],
};
