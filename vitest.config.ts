import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    testTimeout: 60_000,
    // The checkers are child processes and the models are large: two workers are what a small machine has.
    maxWorkers: 2,
  },
});
