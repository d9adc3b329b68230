import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    name: 'launcher',
    include: ['**/*.spec.ts'],
    // Each starts a database and waits for it to end.
    testTimeout: 60_000,
    hookTimeout: 60_000,
    fileParallelism: false,
    sequence: { groupOrder: 2 },
  },
});
