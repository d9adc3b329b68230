import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: { projects: ['shared', 'probe-sim', 'hub', 'tablet'] },
});
