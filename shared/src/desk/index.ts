export { acidAdvice, baseRatioFromPh, USUAL_DRINK_PH } from './acid-advice.js';
export * from './desk-figures.js';
export { drinkPlanOf } from './drink-plan.js';
export { plannedDay } from './planned-day.js';
export * from './types.js';
export * from './workings.js';
