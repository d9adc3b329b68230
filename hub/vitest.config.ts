import { defineConfig } from 'vitest/config';

export default defineConfig({
  // Nest wires by the types of constructor parameters; without this the metadata would depend on which tsconfig a file belongs to.
  oxc: { decorator: { legacy: true, emitDecoratorMetadata: true }, assumptions: { setPublicClassFields: true } },
  test: {
    name: 'hub',
    include: ['src/**/*.spec.ts', 'test/**/*.spec.ts'],
    globalSetup: ['test/global-setup.ts'],
    // Models are classes that belong to one connection: a spec file has them for itself.
    isolate: true,
    // Each file boots a hub on a database of its own; more at once than this only makes them wait for each other.
    maxWorkers: 2,
    // After the specs without a database, and not among them.
    sequence: { groupOrder: 1 },
    hookTimeout: 120_000,
    testTimeout: 60_000,
  },
});
