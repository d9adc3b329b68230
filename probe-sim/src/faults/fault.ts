import type { Reading } from '@steepfall/shared/readings';
import { nextUniform, seedRandom } from '../random.js';

export const faultKinds = ['dropout', 'open-wire', 'power-on', 'spike', 'drift', 'duplicate', 'late'] as const;
export type FaultKind = (typeof faultKinds)[number];

/** One fault of a probe or its line. Instants are on the clock of the readings. */
export interface Fault {
  kind: FaultKind;
  fromMs: number;
  /** 0 means: the one reading at or after `fromMs`. */
  durationMs: number;
  /** What it is measured in depends on the kind: see `faultFacts`. */
  amount: number;
}

interface FaultFact {
  durationMs: number;
  amount: number;
  /** For people. */
  meaning: string;
}

/** Defaults, and what each one is. */
export const faultFacts: Record<FaultKind, FaultFact> = {
  dropout: { durationMs: 20_000, amount: 0, meaning: 'no readings at all' },
  'open-wire': {
    durationMs: 20_000,
    amount: -127,
    meaning: "the driver's code for a broken wire, -127, or the amount",
  },
  'power-on': { durationMs: 0, amount: 85, meaning: 'the 85.0 of a chip that has just started' },
  spike: { durationMs: 0, amount: 8, meaning: 'off by the amount in °C, up or down; in a longer spell one in five' },
  drift: { durationMs: 600_000, amount: 0.2, meaning: 'creeps by the amount in °C a minute, and stays off' },
  duplicate: { durationMs: 20_000, amount: 0, meaning: 'everything is sent twice' },
  late: {
    durationMs: 20_000,
    amount: 5,
    meaning: 'every other reading comes the amount in seconds later, out of order',
  },
};

/** A fault of the given kind with its usual duration and amount. */
export function fault(
  kind: FaultKind,
  fromMs: number,
  told: Partial<Pick<Fault, 'durationMs' | 'amount'>> = {},
): Fault {
  const { durationMs, amount } = faultFacts[kind];
  return { kind, fromMs, durationMs, amount, ...told };
}

/** A stream of readings on its way from the probe, one at a time. */
export interface FaultyLine {
  /** Adds a fault while it runs. */
  add(fault: Fault): void;
  /** What comes out when this reading goes in: none, one or several, perhaps older ones. */
  pass(reading: Reading): Reading[];
  /** What is still held back when the stream ends. */
  rest(): Reading[];
}

/** A line with faults; the same seed and readings give the same faults. */
export function faultyLine(faults: readonly Fault[] = [], seed = 1): FaultyLine {
  const running: RunningFault[] = faults.map((told) => ({ told, count: 0 }));
  let held: Held[] = [];
  let state = seedRandom(seed);
  const random = () => {
    const { value, next } = nextUniform(state);
    state = next;
    return value;
  };

  return {
    add(told) {
      running.push({ told, count: 0 });
    },
    pass(reading) {
      let out = [reading];
      for (const one of running)
        out = out.flatMap((each) => (isOn(one, each) ? disturb(one, each, random, held) : [each]));
      const due = held.filter(({ untilMs }) => untilMs <= reading.atMs);
      held = held.filter(({ untilMs }) => untilMs > reading.atMs);
      return [...out, ...due.map((each) => each.reading)];
    },
    rest() {
      const last = held;
      held = [];
      return last.map((each) => each.reading);
    },
  };
}

/** All readings of a finished stream with the faults in it. */
export function withFaults(readings: Iterable<Reading>, faults: readonly Fault[], seed = 1): Reading[] {
  const line = faultyLine(faults, seed);
  return [...[...readings].flatMap((reading) => line.pass(reading)), ...line.rest()];
}

interface Held {
  reading: Reading;
  untilMs: number;
}

interface RunningFault {
  told: Fault;
  /** Readings that it had. */
  count: number;
}

function isOn({ told, count }: RunningFault, reading: Reading): boolean {
  if (reading.atMs < told.fromMs) return false;
  // What has drifted stays off.
  if (told.kind === 'drift') return true;
  return told.durationMs > 0 ? reading.atMs < told.fromMs + told.durationMs : count === 0;
}

function disturb(one: RunningFault, reading: Reading, random: () => number, held: Held[]): Reading[] {
  const { kind, fromMs, durationMs, amount } = one.told;
  one.count += 1;
  switch (kind) {
    case 'dropout':
      return [];
    case 'open-wire':
    case 'power-on':
      return [{ ...reading, tempC: amount }];
    case 'spike':
      return durationMs > 0 && random() >= 0.2 ? [reading] : [off(reading, random() < 0.5 ? amount : -amount)];
    case 'drift':
      return [off(reading, (amount * Math.min(durationMs, reading.atMs - fromMs)) / 60_000)];
    case 'duplicate':
      return [reading, reading];
    case 'late':
      if (one.count % 2 === 0) return [reading];
      held.push({ reading, untilMs: reading.atMs + amount * 1000 });
      return [];
  }
}

function off(reading: Reading, byC: number): Reading {
  return reading.tempC === null ? reading : { ...reading, tempC: Number((reading.tempC + byC).toFixed(4)) };
}
