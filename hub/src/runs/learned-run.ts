import { capacityJPerK, coilJPerK } from '@steepfall/shared/desk';
import { potLossW } from '@steepfall/shared/figures';
import type { Reading } from '@steepfall/shared/readings';
import type { RunState } from '@steepfall/shared/runs';
import type { KettleFacts, RecipeDocument } from '@steepfall/shared/sheets';
import type { FinishedRun, HeatingFacts, WatchAct, WatchConfig } from '@steepfall/shared/watch';

/** A run that is over, as the learning wants it. */
export function finishedRun(state: RunState, watch: WatchConfig, readings: readonly Reading[]): FinishedRun {
  const { kit, document } = state;
  const acts = state.steps.flatMap(({ step, doneAtMs }) =>
    doneAtMs === null ? [] : step.acts.map((act) => ({ act, atMs: doneAtMs })),
  );
  const coil = kit?.chiller && isHeatedWithCoil(acts) ? coilJPerK(kit.chiller) : 0;
  return { watch, readings, acts, heating: kit?.kettle && document ? heatingOf(kit.kettle, document, coil) : null };
}

/** True when the coil was in for most of the heating: its metal and the water inside it were heated too. */
function isHeatedWithCoil(acts: FinishedRun['acts']): boolean {
  const atMs = (name: WatchAct) => acts.find(({ act }) => act === name)?.atMs;
  const [onMs, coilMs] = [atMs('heat-on'), atMs('coil-in')];
  if (onMs === undefined || coilMs === undefined) return false;
  const offMs = atMs('heat-off') ?? atMs('chiller-on') ?? Infinity;
  return coilMs - onMs < (offMs - onMs) / 2;
}

/** Heating is looked at on its way through about this. */
const HALFWAY_C = 45;
const ROOM_C = 21;
const HUMIDITY = 0.5;

function heatingOf(kettle: KettleFacts, document: RecipeDocument, coil: number): HeatingFacts {
  const { diameterM, heaterPowerW } = kettle;
  const depthM = document.waterL / 1000 / ((Math.PI * diameterM ** 2) / 4);
  const pot = { tempC: HALFWAY_C, roomC: ROOM_C, humidityRatio: HUMIDITY, diameterM, depthM, lid: true };
  return {
    heatCapacityJPerK: capacityJPerK(document, kettle) + coil,
    powerW: heaterPowerW,
    lossWPerK: potLossW(pot) / (HALFWAY_C - ROOM_C),
  };
}
