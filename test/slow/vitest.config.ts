import { defineConfig } from 'vitest/config';

/** What takes minutes: one file after the other, so that each has the machine to itself. */
export default defineConfig({
  test: {
    include: ['test/slow/**/*.slow.ts'],
    testTimeout: 30 * 60_000,
    hookTimeout: 60_000,
    fileParallelism: false,
  },
});
