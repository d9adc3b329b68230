import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: { projects: ['shared', 'probe-sim', 'hub', 'tablet', 'hub/launcher', 'tablet/e2e'] },
});
