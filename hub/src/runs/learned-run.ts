import { capacityJPerK } from '@steepfall/shared/desk';
import { potLossW } from '@steepfall/shared/figures';
import type { Reading } from '@steepfall/shared/readings';
import type { RunState } from '@steepfall/shared/runs';
import type { KettleFacts, RecipeDocument } from '@steepfall/shared/sheets';
import type { FinishedRun, HeatingFacts, WatchConfig } from '@steepfall/shared/watch';

/** A run that is over, as the learning wants it. */
export function finishedRun(state: RunState, watch: WatchConfig, readings: readonly Reading[]): FinishedRun {
  const { kit, document } = state;
  return {
    watch,
    readings,
    acts: state.steps.flatMap(({ step, doneAtMs }) =>
      doneAtMs === null ? [] : step.acts.map((act) => ({ act, atMs: doneAtMs })),
    ),
    heating: kit?.kettle && document ? heatingOf(kit.kettle, document) : null,
  };
}

/** Heating is looked at on its way through about this. */
const HALFWAY_C = 45;
const ROOM_C = 21;
const HUMIDITY = 0.5;

function heatingOf(kettle: KettleFacts, document: RecipeDocument): HeatingFacts {
  const { diameterM, heaterPowerW } = kettle;
  const depthM = document.waterL / 1000 / ((Math.PI * diameterM ** 2) / 4);
  const pot = { tempC: HALFWAY_C, roomC: ROOM_C, humidityRatio: HUMIDITY, diameterM, depthM, lid: true };
  return {
    heatCapacityJPerK: capacityJPerK(document, kettle),
    powerW: heaterPowerW,
    lossWPerK: potLossW(pot) / (HALFWAY_C - ROOM_C),
  };
}
