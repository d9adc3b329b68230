export * from './heat-flow.js';
export * from './kettle.js';
export * from './kettle-run.js';
export * from './setup.js';
