export * from './cautions.js';
export * from './compile.js';
export * from './recipe.js';
export * from './step.js';
