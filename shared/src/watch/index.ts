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
export { learnInTurns, learnRun, type FinishedRun, type RunLessons } from './learn.js';
export type { HeatingFacts } from './learn-kettle.js';
export type { Learned, Lesson, LessonGap } from './learn-lesson.js';
export {
  learnedReach,
  LONGEST_REACH_S,
  SHORTEST_REACH_S,
  type AnsweredCall,
  type LearnedReach,
} from './learn-reach.js';
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
  WatchMode,
  WatchReading,
  WatchStatus,
  WatchVerdict,
} from './types.js';
export { watchAct, watchReading } from './watch.js';
