export * from './run-builders.js';
