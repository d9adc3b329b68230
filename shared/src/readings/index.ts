
export * from './reading.js';
