import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    testTimeout: 120_000,
    hookTimeout: 120_000,
    // Tests start worker threads and whole runs of the program; each file gets a process of its own.
    pool: 'forks',
    setupFiles: ['./test/fast-check-seed.ts'],
    reporters: ['default', './test/counts-reporter.ts'],
  },
});
