export * from './addition-steps.js';
export * from './cautions.js';
export * from './check-sheet.js';
export * from './compile.js';
export * from './day-order.js';
export * from './kit.js';
export * from './recipe.js';
export * from './step.js';
