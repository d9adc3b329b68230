export * from './ingredient.js';
export * from './stock.js';
