export * from './pace.js';
export * from './wall-clock.js';
