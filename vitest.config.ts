import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const alias = { '@': fileURLToPath(new URL('./src', import.meta.url)) };

/** `pure` needs nothing; `database` needs the private cluster that scripts/test.mjs starts (DATABASE_URL set). */
export default defineConfig({
  resolve: { alias },
  test: {
    projects: [
      {
        resolve: { alias },
        test: {
          name: 'pure',
          include: ['src/**/*.test.{ts,tsx}', 'tests/{properties,published}/**/*.test.ts'],
          exclude: ['**/*.server.test.ts'],
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'database',
          include: ['src/**/*.server.test.ts', 'tests/http/**/*.test.ts'],
          fileParallelism: false,
        },
      },
    ],
  },
});
