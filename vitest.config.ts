import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const alias = { '@': fileURLToPath(new URL('./src', import.meta.url)) };
/** What Astro makes out of the env schema of astro.config.mjs when it builds. */
const server = {
  ...alias,
  'astro:env/server': fileURLToPath(new URL('./tests/support/env.ts', import.meta.url)),
};

/** `pure` needs nothing; `database` needs the private cluster that scripts/test.mjs starts (DATABASE_URL set). */
export default defineConfig({
  resolve: { alias },
  test: {
    // npm run coverage: of the engine, which is to be beyond doubt.
    coverage: {
      provider: 'v8',
      include: ['src/engine/**/*.ts'],
      exclude: ['**/*.test.ts'],
      reporter: ['text', 'json-summary'],
      thresholds: { lines: 95, branches: 95 },
    },
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'pure',
          include: ['src/**/*.test.{ts,tsx}', 'tests/{properties,published}/**/*.test.ts'],
          exclude: ['**/*.server.test.ts'],
          setupFiles: 'tests/support/seed.ts',
          // Sweeps of the parameter box take seconds on a machine that does other things as well.
          testTimeout: 30_000,
        },
      },
      {
        resolve: { alias: server },
        test: {
          name: 'database',
          include: ['src/**/*.server.test.ts', 'tests/http/**/*.test.ts'],
          fileParallelism: false,
          // Hashing a password is slow on purpose, on a busy machine all the more.
          testTimeout: 60_000,
        },
      },
    ],
  },
});
