import astro from 'eslint-plugin-astro';
import importX from 'eslint-plugin-import-x';
import tseslint from 'typescript-eslint';

/** The engine's modules in their order: each may import only those before it, and only through their index. */
const ENGINE_ORDER = [
  'quantity',
  'polynomial',
  'linear',
  'model',
  'combination',
  'chart',
  'beam',
  'stiffness',
  'proof',
  'continuous',
  'envelope',
  'influence',
  'vibration',
  'derivation',
  'section',
  'check',
  'template',
  'why',
  'sheet',
];

const engineZones = ENGINE_ORDER.slice(0, -1).map((module, index) => ({
  target: `./src/engine/${module}`,
  from: ENGINE_ORDER.slice(index + 1).map((later) => `./src/engine/${later}`),
  message: `engine/${module} may import earlier engine modules only (architecture: ${ENGINE_ORDER.join(', ')})`,
}));

/** The import table of DEVELOPERS.md, row by row: what a folder must never reach. */
const zones = [
  ...engineZones,
  {
    target: './src/engine',
    from: ['./src/features', './src/db', './src/http', './src/services', './src/components', './src/pages'],
    message: 'The engine is pure: it knows no screen, database or request',
  },
  {
    target: './src/lib',
    from: ['./src/engine', './src/features', './src/db', './src/http', './src/services', './src/components'],
    message: 'lib must make sense in any project',
  },
  {
    target: './src/features/*/!(*.server|*.server.test|*.api|*.client).ts',
    from: ['./src/{db,http,services,components}/**', './src/features/*/*.server.ts'],
    message: 'A pure feature file takes values and returns values',
  },
  {
    target: './src/db',
    from: ['./src/http', './src/pages', './src/components'],
    message: 'The database layer knows no request and no screen',
  },
  {
    target: './src/features/*/*.server.ts',
    from: ['./src/components', './src/pages', './src/layouts'],
    message: 'A use case knows no screen',
  },
  {
    target: './src/components',
    from: ['./src/features', './src/db', './src/http', './src/services', './src/pages'],
    message: 'Components know no feature and no database',
  },
  {
    target: ['./src/features/*/*.tsx', './src/features/*/*.client.ts'],
    from: ['./src/{db,http,services}/**', './src/features/*/*.server.ts'],
    message: "An island runs in the browser: use the feature's x.api.ts",
  },
  {
    target: './src/pages',
    from: './src/db',
    message: 'Pages ask use cases (features/*/x.server.ts), never the database',
  },
  { target: './src/layouts', from: './src/db', message: 'Layouts ask nothing of the database' },
];

const TESTS = ['**/*.test.{ts,tsx}', 'tests/**'];

export default [
  { ignores: ['dist/**', 'node_modules/**', '.astro/**', 'drizzle/**', 'coverage/**'] },
  ...astro.configs['flat/base'],
  {
    files: ['**/*.{ts,tsx,mjs}'],
    languageOptions: { parser: tseslint.parser, parserOptions: { ecmaFeatures: { jsx: true } } },
  },
  {
    files: ['**/*.astro'],
    languageOptions: { parserOptions: { parser: tseslint.parser } },
  },
  {
    files: ['src/**/*.{ts,tsx,astro}', 'scripts/**/*.{ts,mjs}', 'tests/**/*.ts'],
    plugins: { 'import-x': importX },
    settings: {
      'import-x/resolver-next': [
        (await import('eslint-import-resolver-typescript')).createTypeScriptImportResolver(),
      ],
      'import-x/extensions': ['.ts', '.tsx', '.mjs'],
      'import-x/parsers': { '@typescript-eslint/parser': ['.ts', '.tsx'] },
    },
    rules: {
      'import-x/no-restricted-paths': ['error', { zones, basePath: import.meta.dirname }],
      'import-x/no-cycle': ['error', { ignoreExternal: true }],
    },
  },
  {
    files: ['src/**/*.{ts,tsx}'],
    ignores: TESTS,
    rules: {
      'max-lines': ['error', { max: 400, skipComments: true }],
      'max-lines-per-function': ['warn', { max: 60, skipComments: true, skipBlankLines: true }],
      'no-console': 'error',
    },
  },
  {
    files: ['src/engine/**/*.ts'],
    ignores: TESTS,
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              group: ['node:*', 'react', 'react-dom', 'astro', 'astro:*', 'drizzle-orm', 'postgres'],
              message: 'The engine is pure',
            },
            {
              regex: '^@/engine/[a-z]+/(?!parse$)',
              message: 'Another engine module is entered through its index.ts',
            },
          ],
        },
      ],
      'no-restricted-globals': ['error', 'Date', 'fetch', 'process', 'window', 'document'],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Same input, same answer' },
      ],
    },
  },
  {
    files: ['src/pages/**/*.{ts,astro}', 'src/layouts/**/*.astro'],
    rules: { 'no-restricted-imports': ['error', { patterns: ['drizzle-orm', 'drizzle-orm/*', 'postgres'] }] },
  },
];
