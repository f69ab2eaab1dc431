import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: { include: ['test/**/*.long.test.ts'], testTimeout: 900_000, hookTimeout: 120_000 },
});
