import { describe, expect, it } from 'vitest';
import { learnedReach } from './learn-reach.js';

const answered = (...waits: number[]) => waits.map((waitedS) => ({ waitedS, isMissed: false }));
const missed = { waitedS: 180, isMissed: true };

describe('learnedReach', () => {
  it('takes the middle, so that one odd call does not count, and rounds up', () => {
    expect(learnedReach(answered(8.2, 7.9, 9.1, 8.4, 58))).toEqual({
      reachS: 9,
      spreadS: expect.closeTo(1.4826 * 0.5, 3) as number,
      answeredCount: 5,
      missedCount: 0,
    });
  });

  it('counts misses apart: who was not there was not slow', () => {
    expect(learnedReach([...answered(6, 7, 6, 7), missed])).toMatchObject({
      reachS: 7,
      answeredCount: 4,
      missedCount: 1,
    });
  });

  it('looks at the newest ten, and stays within what a ladder can use', () => {
    expect(learnedReach(answered(...Array<number>(10).fill(50), ...Array<number>(10).fill(5))).reachS).toBe(5);
    expect(learnedReach(answered(0.5, 1, 1, 1)).reachS).toBe(3);
    expect(learnedReach(answered(90, 95, 99, 80)).reachS).toBe(60);
  });

  it('has too little to say below four answered calls', () => {
    expect(learnedReach([...answered(6, 7, 8), missed, missed])).toEqual({
      reachS: null,
      spreadS: null,
      answeredCount: 3,
      missedCount: 2,
    });
  });
});
