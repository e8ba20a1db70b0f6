import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** The tests that are fast enough to be run for every mutant (stryker.config.mjs). */
export default defineConfig({
  resolve: { alias: { '@': fileURLToPath(new URL('../../src', import.meta.url)) } },
  test: {
    include: [
      'src/engine/{beam,stiffness,chart,proof}/*.test.ts',
      'tests/published/{exact-beams,solve-examples,beam-tables,chart}.test.ts',
    ],
    setupFiles: 'tests/support/seed.ts',
    // A busy machine is no reason to call a mutant caught; Stryker itself ends what does not end.
    testTimeout: 60_000,
  },
});
