import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const sharedSource = fileURLToPath(new URL('../shared/src', import.meta.url));

export default defineConfig({
  // Specs run against the source of shared, so that they need no build.
  resolve: { alias: [{ find: /^@steepfall\/shared\/([a-z]+)$/, replacement: `${sharedSource}/$1/index.ts` }] },
  test: { name: 'probe-sim', include: ['src/**/*.spec.ts'] },
});
