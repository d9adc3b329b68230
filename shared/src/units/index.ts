export * from './brands.js';
