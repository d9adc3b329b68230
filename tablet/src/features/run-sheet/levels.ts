import type { RunState } from '@steepfall/shared/runs';
import type { Direction } from '@steepfall/shared/sheets';

/** A temperature of the sheet that asks for something. */
export interface Level {
  key: string;
  tempC: number;
  direction: Direction;
  /** What it asks for: "hops in". */
  text: string;
  isDone: boolean;
  /** Run clock; when it was acted on. */
  doneAtMs: number | null;
}

function lowerFirst(text: string): string {
  return text.charAt(0).toLowerCase() + text.slice(1);
}

/** Every level of the sheet in its order. A step that waits for a level asks for the step after it. */
export function levelsOf(state: RunState): Level[] {
  return state.steps.flatMap(({ step, status, doneAtMs }, index) => {
    const following = state.steps[index + 1]?.step;
    const own = step.start.by === 'temperature' ? step.start : null;
    const reached = step.done.by === 'temperature' ? step.done : null;
    const condition = own ?? reached;
    if (!condition) return [];
    const act = own ? step : (following ?? step);
    const { tempC, direction } = condition;
    return [{ key: step.id, tempC, direction, text: lowerFirst(act.title), isDone: status === 'done', doneAtMs }];
  });
}

const AHEAD = 2;

/** What was met, what comes next and what after that: more is clutter. The level that is waited for is always among them. */
export function levelsInSight(levels: readonly Level[], nextKey: string | null): Level[] {
  const ahead = levels.filter(({ isDone }) => !isDone).slice(0, AHEAD);
  return levels.filter((level) => level.isDone || level.key === nextKey || ahead.includes(level));
}
