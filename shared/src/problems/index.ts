export * from './catalogue.js';
export * from './problem.js';
