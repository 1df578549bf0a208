import { defineConfig } from 'vitest/config';

/** Four kinds of tests: `unit` is quick; `http` opens the app on a database; `peers` drive real libraries; `e2e` a browser. */
export default defineConfig({
  test: {
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['tests/**/*.test.ts', 'tests/**/*.test.tsx'],
          exclude: ['tests/http/**', 'tests/peers/**', 'tests/e2e/**'],
          testTimeout: 30_000,
        },
      },
      {
        extends: true,
        test: { name: 'http', include: ['tests/http/**/*.test.ts'], testTimeout: 60_000 },
      },
      {
        extends: true,
        test: { name: 'peers', include: ['tests/peers/**/*.test.ts'], testTimeout: 120_000 },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          // Each file starts the product with its demo; two at once would only slow each other down.
          fileParallelism: false,
          include: ['tests/e2e/**/*.test.ts'],
          testTimeout: 120_000,
          hookTimeout: 180_000,
        },
      },
    ],
  },
});
