export * from './fault.js';
export * from './fault-text.js';
