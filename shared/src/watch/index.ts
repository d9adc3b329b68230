export {
  lagCorrectedDifferenceGain,
  lagCorrectedLineGain,
  lineCrossingSdS,
  newtonCrossingSdS,
  type LineBoundInput,
  type NewtonBoundInput,
} from './bounds.js';
export { estimateAt } from './estimate.js';
export { forecastCrossing, forecastCurve } from './forecast.js';
export { startLadder, stepLadder, type LadderState } from './ladder.js';
export { learnedFrom } from './learn.js';
export { startWatch, type WatchState } from './state.js';
export { startTimerLadder, stepTimerLadder, type TimerLadderState } from './timer-ladder.js';
export type {
  CatchTarget,
  CrossingDirection,
  CrossingForecast,
  CrossingTarget,
  ForecastPoint,
  LadderAlert,
  LadderStage,
  TimerTarget,
  WatchAct,
  WatchActDone,
  WatchConfig,
  WatchEstimate,
  WatchLearned,
  WatchMode,
  WatchReading,
  WatchStatus,
  WatchVerdict,
} from './types.js';
export { watchAct, watchReading } from './watch.js';
