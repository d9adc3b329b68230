export * from './cautions.js';
export * from './recipe.js';
export * from './step.js';
