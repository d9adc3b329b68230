export * from './events.js';
export * from './state.js';
