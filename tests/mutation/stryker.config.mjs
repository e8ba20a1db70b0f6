/**
 * Stryker on the arithmetic of the solvers and the charts: npm run mutation. What it cannot see, the arithmetic that is
 * spelled as methods and the numbers themselves, scripts/mutate changes (npm run perturb). See README.md.
 * https://stryker-mutator.io/docs names the options
 */
export default {
  testRunner: 'vitest',
  plugins: ['@stryker-mutator/vitest-runner'],
  vitest: { configFile: 'tests/mutation/vitest.config.ts' },
  mutate: ['src/engine/{beam,stiffness,chart}/*.ts', '!**/*.test.ts'],
  mutator: {
    // All but ArithmeticOperator, AssignmentOperator, UnaryOperator and UpdateOperator.
    excludedMutations: [
      'ArrayDeclaration',
      'ArrowFunction',
      'BlockStatement',
      'BooleanLiteral',
      'ConditionalExpression',
      'EqualityOperator',
      'LogicalOperator',
      'MethodExpression',
      'ObjectLiteral',
      'OptionalChaining',
      'Regex',
      'StringLiteral',
    ],
  },
  coverageAnalysis: 'perTest',
  concurrency: 1,
  ignorePatterns: ['/*', '!/src', '!/tests', '!/data', '!/package.json', '!/tsconfig.json'],
  tempDirName: '.cache/stryker',
  reporters: ['clear-text', 'progress-append-only', 'json'],
  jsonReporter: { fileName: '.cache/mutation.json' },
  clearTextReporter: { allowColor: false, allowEmojis: false, logTests: false, reportTests: false },
  thresholds: { high: 95, low: 90, break: 90 },
};
