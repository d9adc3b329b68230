export * from './run-builders.js';
export * from './recipe-builders.js';
