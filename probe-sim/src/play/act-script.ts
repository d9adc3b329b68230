import { vesselActSchema } from '@steepfall/shared/sheets';
import type { KettleAct } from '../kettle/index.js';
import { durationMsFromText } from '../text/duration-text.js';

type Trigger =
  | { on: 'time'; atMs: number }
  /** After the act before it. */
  | { on: 'delay'; durationMs: number }
  /** When the liquid comes to it, from above or from below. */
  | { on: 'temperature'; tempC: number };

export interface ScriptedAct {
  act: KettleAct;
  trigger: Trigger;
}

/** A whole day: heat, steep, chill, hops on the fall. */
export const DAY =
  'lid-on@0,heat-on@0,heat-off@76C,tea-in@+5s,tea-out@+3m,lid-off@+5s,chiller-on@+10s,hops-in@62C,hops-out@30C,chiller-off@20C';

const SHORT: Record<string, string> = {
  heat: 'heat-on',
  lid: 'lid-on',
  coil: 'coil-in',
  tea: 'tea-in',
  chiller: 'chiller-on',
  hops: 'hops-in',
  stir: 'stirred',
};

const SHAPE = /^([a-z-]+)@(\+?)([^=]+)(?:=(.+))?$/;

/**
 * Reads acts in the order they are done: `heat@0,coil-in@76C,tea-in@+10s,cold-water@20m=2` (kg). A time counts from the start,
 * `+` from the act before, `C` waits for a temperature of the liquid. `day` is a whole day.
 *
 * @throws RangeError that says what is wrong and what would be right.
 */
export function scriptFromText(text: string): ScriptedAct[] {
  return (text.trim() === 'day' ? DAY : text).split(',').map((part) => scriptedAct(part.trim()));
}

export interface FollowedScript {
  /** What is to be done by now, and when it became due. Each act comes once, in order. */
  due(nowMs: number, tempC: number): { act: KettleAct; dueMs: number }[];
  readonly isDone: boolean;
}

export function followScript(script: readonly ScriptedAct[]): FollowedScript {
  let next = 0;
  let doneMs = 0;
  /** Side of the awaited temperature on which the liquid was first seen. */
  let isBelow: boolean | null = null;

  const dueMsOf = ({ trigger }: ScriptedAct, nowMs: number, tempC: number): number | null => {
    if (trigger.on === 'temperature') {
      isBelow ??= tempC < trigger.tempC;
      return isBelow ? (tempC >= trigger.tempC ? nowMs : null) : tempC <= trigger.tempC ? nowMs : null;
    }
    const atMs = Math.max(doneMs, trigger.on === 'time' ? trigger.atMs : doneMs + trigger.durationMs);
    return atMs <= nowMs ? atMs : null;
  };

  return {
    due(nowMs, tempC) {
      const acts: { act: KettleAct; dueMs: number }[] = [];
      for (let scripted = script[next]; scripted; scripted = script[next]) {
        const dueMs = dueMsOf(scripted, nowMs, tempC);
        if (dueMs === null) break;
        acts.push({ act: scripted.act, dueMs });
        doneMs = dueMs;
        isBelow = null;
        next += 1;
      }
      return acts;
    },
    get isDone() {
      return next >= script.length;
    },
  };
}

function scriptedAct(text: string): ScriptedAct {
  const [, name, plus, when, amount] = SHAPE.exec(text) ?? [];
  if (!name || !when)
    throw new RangeError(`"${text}" is no act. Write act@when, such as heat@0, tea-in@76C or tea-out@+3m.`);
  return { act: actOf(name, amount, text), trigger: triggerOf(plus === '+', when) };
}

function actOf(name: string, amount: string | undefined, text: string): KettleAct {
  if (name === 'cold-water') {
    const massKg = Number(amount ?? 1);
    if (!(massKg > 0)) throw new RangeError(`"${text}": how many kg? Write cold-water@20m=2.`);
    return { act: 'cold-water', massKg };
  }
  const act = vesselActSchema.safeParse(SHORT[name] ?? name);
  if (!act.success) {
    throw new RangeError(`There is no act "${name}". Known: ${[...vesselActSchema.options, 'cold-water'].join(', ')}.`);
  }
  if (amount !== undefined) throw new RangeError(`"${text}": only cold-water has an amount.`);
  return act.data;
}

function triggerOf(isDelay: boolean, when: string): Trigger {
  if (isDelay) return { on: 'delay', durationMs: durationMsFromText(when) };
  const temperature = /^(\d+(?:\.\d+)?)C$/.exec(when);
  if (temperature) return { on: 'temperature', tempC: Number(temperature[1]) };
  return { on: 'time', atMs: durationMsFromText(when) };
}
