import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    globalSetup: ['test/tools/buildOnce.ts'],
    include: ['test/**/*.test.ts'],
    reporters: ['default', './test/tools/closingLine.js'],
    testTimeout: 60_000,
    hookTimeout: 120_000,
  },
});
