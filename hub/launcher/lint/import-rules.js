/**
 * Who may import whom. The same table in words is in DEVELOPERS.md.
 */

/** @param {string} workspace as its source and as its build: across workspaces an import resolves to the build */
const areasOf = (workspace) => [`${workspace}/src/*`, `${workspace}/dist/*`];

/** The first that matches a file counts. */
export const elements = [
  { type: 'shared', pattern: areasOf('shared'), capture: ['area'] },

  { type: 'probe-sim', pattern: areasOf('probe-sim'), capture: ['area'] },
  { type: 'probe-sim-root', pattern: 'probe-sim/src' },

  { type: 'hub-ground', pattern: ['hub/src/common', 'hub/src/config', 'hub/src/database'], capture: [] },
  { type: 'hub-demo', pattern: 'hub/src/demo' },
  { type: 'hub-feature', pattern: 'hub/src/*', capture: ['feature'] },
  { type: 'hub-root', pattern: 'hub/src' },
  { type: 'hub-test', pattern: 'hub/test' },
  { type: 'launcher', pattern: 'hub/launcher' },

  { type: 'tablet-app', pattern: 'tablet/src/app' },
  { type: 'tablet-feature', pattern: 'tablet/src/features/*', capture: ['feature'] },
  { type: 'tablet-components', pattern: 'tablet/src/components' },
  { type: 'tablet-lib', pattern: 'tablet/src/lib' },
  { type: 'tablet-sw', pattern: 'tablet/src/sw' },
  { type: 'tablet-testing', pattern: 'tablet/src/testing' },
  { type: 'tablet-root', pattern: 'tablet/src' },
  { type: 'tablet-e2e', pattern: 'tablet/e2e' },
].map((element) => ({ ...element, partialMatch: false }));

export const files = [{ category: 'spec', pattern: '**/*.spec.{ts,tsx}' }];

/** What each area of shared may import: everything to its left in the order of the areas. */
const areasOfShared = {
  units: [],
  figures: ['units'],
  problems: [],
  sheets: ['units', 'figures'],
  stores: ['units', 'figures', 'sheets'],
  desk: ['units', 'figures', 'sheets', 'stores'],
  readings: ['units', 'figures'],
  timers: ['units', 'figures'],
  watch: ['units', 'figures', 'readings', 'timers', 'sheets'],
  runs: ['units', 'figures', 'sheets', 'stores', 'desk', 'readings', 'timers', 'watch', 'problems'],
  contracts: ['units', 'figures', 'sheets', 'stores', 'desk', 'readings', 'timers', 'watch', 'runs', 'problems'],
  testing: [
    'units',
    'figures',
    'sheets',
    'stores',
    'desk',
    'readings',
    'timers',
    'watch',
    'runs',
    'contracts',
    'problems',
  ],
};

/** For production code: builders of tests stay out of it. */
const sharedForAll = { type: 'shared', captured: { area: '!testing' } };

/** @param {string} type @param {object[]} targets */
const mayImport = (type, targets) => ({
  from: { element: { type } },
  allow: { to: { element: [{ type }, ...targets] } },
});

export const policies = [
  ...Object.entries(areasOfShared).map(([area, targets]) => ({
    from: { element: { type: 'shared', captured: { area } } },
    allow: { to: { element: { type: 'shared', captured: { area: [area, ...targets] } } } },
    message: `shared/${area} may import only ${targets.join(', ') || 'nothing of ours'}.`,
  })),

  {
    from: { element: { type: 'probe-sim' } },
    allow: {
      to: {
        element: [
          { type: 'probe-sim', captured: { area: '!testing' } },
          { type: 'probe-sim-root', fileInternalPath: '!main.ts' },
          sharedForAll,
        ],
      },
    },
  },
  mayImport('probe-sim-root', [{ type: 'probe-sim', captured: { area: '!testing' } }, sharedForAll]),

  mayImport('hub-ground', [sharedForAll]),
  {
    from: { element: { type: 'hub-feature' } },
    allow: {
      to: {
        element: [
          { type: 'hub-feature', captured: { feature: '{{ from.element.captured.feature }}' } },
          // What a feature shows to the others: its module, the services the module exports, its rows and its messages.
          {
            type: 'hub-feature',
            fileInternalPath: ['*.module.ts', '*.service.ts', '*.schema.ts', 'models/*.model.ts'],
          },
          { type: 'hub-ground' },
          { type: 'probe-sim', captured: { area: '!testing' } },
          sharedForAll,
        ],
      },
    },
    message:
      'A hub feature may import common, config, database, and of another feature its module, services, schemas, models and any type.',
  },
  {
    from: { element: { type: 'hub-feature' } },
    dependency: { kind: 'type' },
    allow: { to: { element: { type: 'hub-feature' } } },
  },
  mayImport('hub-demo', [{ type: 'hub-feature' }, { type: 'hub-ground' }, { type: 'probe-sim' }, sharedForAll]),
  mayImport('hub-root', [{ type: 'hub-*' }, sharedForAll]),
  mayImport('hub-test', [{ type: 'hub-*' }, { type: 'launcher' }, { type: 'probe-sim*' }, { type: 'shared' }]),
  mayImport('launcher', []),

  mayImport('tablet-root', [{ type: 'tablet-app' }, { type: 'tablet-lib' }]),
  mayImport('tablet-app', [
    { type: 'tablet-feature' },
    { type: 'tablet-components' },
    { type: 'tablet-lib' },
    sharedForAll,
  ]),
  {
    from: { element: { type: 'tablet-feature' } },
    allow: {
      to: {
        element: [
          { type: 'tablet-feature', captured: { feature: '{{ from.element.captured.feature }}' } },
          { type: 'tablet-components' },
          { type: 'tablet-lib' },
          sharedForAll,
        ],
      },
    },
    message: 'A tablet feature may import components, lib and shared, and no other feature: a route joins two of them.',
  },
  mayImport('tablet-components', [{ type: 'tablet-lib' }, sharedForAll]),
  mayImport('tablet-lib', [sharedForAll]),
  mayImport('tablet-sw', [sharedForAll]),
  mayImport('tablet-testing', [{ type: 'tablet-*' }, { type: 'shared' }]),
  mayImport('tablet-e2e', [{ type: 'launcher' }, { type: 'probe-sim' }, { type: 'shared' }]),

  {
    from: { file: { categories: 'spec' } },
    allow: {
      to: {
        element: [
          { type: 'shared' },
          { type: 'probe-sim' },
          { type: 'hub-test' },
          { type: 'hub-feature', fileInternalPath: ['**/*.ts'] },
          { type: 'tablet-testing' },
        ],
      },
    },
  },
  {
    // A spec is no excuse for reaching into another workspace.
    from: { element: { type: ['tablet-*', 'shared', 'probe-sim*'] } },
    disallow: { to: { element: { type: 'hub-*' } } },
    message: 'Only the hub and its launcher import the hub; others talk to it.',
  },
];
