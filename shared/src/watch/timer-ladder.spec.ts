import { describe, expect, it } from 'vitest';
import { startTimerLadder, stepTimerLadder } from './timer-ladder.js';

const TEA = { key: 'tea-out', endsAtMs: 300_000, reachS: 8 };

function run(seconds: readonly number[], target = TEA) {
  let ladder = startTimerLadder(target);
  return seconds.flatMap((second) => {
    const step = stepTimerLadder(ladder, second * 1000);
    ladder = step.ladder;
    return step.raised.map(({ stage }) => [second, stage]);
  });
}

describe('stepTimerLadder', () => {
  it('climbs once, reach taken off', () => {
    const everySecond = Array.from({ length: 400 }, (_, i) => i);
    expect(run(everySecond)).toEqual([
      [172, 'coming-up'],
      [262, 'stand-by'],
      [292, 'now'],
      [315, 'missed'],
    ]);
  });

  it('gives only the highest stage after a sleep', () => {
    expect(run([100, 295, 296])).toEqual([[295, 'now']]);
    expect(run([100, 900])).toEqual([[900, 'missed']]);
  });

  it('starts on the rung it is due on when the timer is short', () => {
    expect(run([0, 1], { ...TEA, endsAtMs: 25_000 })).toEqual([[0, 'stand-by']]);
  });

  it('names the timer and its end, and no temperature', () => {
    const { raised } = stepTimerLadder(startTimerLadder(TEA), 295_000);
    expect(raised).toEqual([
      {
        key: 'tea-out',
        stage: 'now',
        crossing: 1,
        atMs: 295_000,
        tempC: null,
        crossingAtMs: 300_000,
        earlyMs: 300_000,
        lateMs: 300_000,
      },
    ]);
  });
});
