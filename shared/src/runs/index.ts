export * from './boot-driver.js';
export * from './decide.js';
export * from './driver.js';
export * from './events.js';
export * from './fold.js';
export * from './state.js';
export * from './selectors.js';
export * from './spoken.js';
