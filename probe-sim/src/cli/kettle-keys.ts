import type { FaultKind } from '../faults/index.js';
import type { KettleAct, KettleState } from '../kettle/index.js';

export const KEYS =
  'h heat  l lid  c coil in  t tea  w chiller  p hops  s stir  + 1 kg of cold water\n' +
  '1 dropout  2 open wire  3 power-on 85.0  4 spike  5 drift  6 duplicate  7 late  q quit';

/** What a key does to the kettle as it is now: most of them switch. */
export function actOfKey(key: string, kettle: KettleState): KettleAct | null {
  switch (key) {
    case 'h':
      return kettle.isHeatOn ? 'heat-off' : 'heat-on';
    case 'l':
      return kettle.isLidOn ? 'lid-off' : 'lid-on';
    case 'c':
      return 'coil-in';
    case 't':
      return kettle.isTeaIn ? 'tea-out' : 'tea-in';
    case 'w':
      return kettle.isChillerOn ? 'chiller-off' : 'chiller-on';
    case 'p':
      return kettle.isHopsIn ? 'hops-out' : 'hops-in';
    case 's':
      return 'stirred';
    case '+':
      return { act: 'cold-water', massKg: 1 };
    default:
      return null;
  }
}

const faultKeys: Record<string, FaultKind> = {
  1: 'dropout',
  2: 'open-wire',
  3: 'power-on',
  4: 'spike',
  5: 'drift',
  6: 'duplicate',
  7: 'late',
};

export function faultOfKey(key: string): FaultKind | null {
  return faultKeys[key] ?? null;
}

/** One line about the kettle, for a terminal. */
export function statusText(kettle: KettleState, shownC: number, waitingCount: number): string {
  const clock = new Date(kettle.atS * 1000).toISOString().slice(11, 19);
  const on = [
    kettle.isHeatOn && 'heat',
    kettle.isLidOn && 'lid',
    kettle.isCoilIn && 'coil',
    kettle.isTeaIn && 'tea',
    kettle.isChillerOn && 'chiller',
    kettle.isHopsIn && 'hops',
  ].filter((word) => word !== false);
  const waiting = waitingCount > 1 ? `  ${waitingCount} readings wait` : '';
  return `${clock}  liquid ${kettle.tempC.toFixed(1)} °C  probe ${shownC.toFixed(1)} °C  ${on.join(', ') || 'all off'}${waiting}`;
}
