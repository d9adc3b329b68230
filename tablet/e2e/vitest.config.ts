import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    name: 'e2e',
    include: ['**/*.e2e.spec.ts'],
    globalSetup: ['global-setup.ts'],
    // A day is told in order, and one product at a time is enough for two cores.
    fileParallelism: false,
    sequence: { concurrent: false, groupOrder: 3 },
    testTimeout: 240_000,
    hookTimeout: 120_000,
  },
});
