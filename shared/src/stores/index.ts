export { checkStoresHead, storesColumns, type StoresCellProblem, type StoresColumn } from './csv-columns.js';
export * from './csv-row.js';
export * from './ingredient.js';
export * from './stock.js';
