import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    // Wide: a busy machine must fail no test.
    testTimeout: 300_000,
    hookTimeout: 300_000,
    // The checkers are child processes and the models are large: two workers are what a small machine has.
    maxWorkers: 2,
  },
});
