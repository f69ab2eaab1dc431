import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    exclude: ['test/**/*.long.test.ts', 'node_modules/**'],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    expect: { poll: { timeout: 10_000 } }, // pages answer late on a busy machine
  },
});
