export * from './run-clock.js';
export * from './timer.js';
