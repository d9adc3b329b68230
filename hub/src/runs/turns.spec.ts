import { describe, expect, it } from 'vitest';
import { Turns } from './turns.js';

const pause = () => new Promise((resolve) => setTimeout(resolve, 1));

describe(Turns, () => {
  it('does one thing at a time for a key, in the order asked, and others meanwhile', async () => {
    const turns = new Turns();
    const told: string[] = [];
    const work = (name: string) => async () => {
      told.push(`${name} begins`);
      await pause();
      told.push(`${name} ends`);
      return name;
    };
    const results = await Promise.all([
      turns.take('a', work('first')),
      turns.take('a', work('second')),
      turns.take('b', work('other')),
    ]);
    expect(results).toEqual(['first', 'second', 'other']);
    expect(told.indexOf('second begins')).toBeGreaterThan(told.indexOf('first ends'));
    expect(told.indexOf('other begins')).toBeLessThan(told.indexOf('first ends'));
  });

  it('goes on after a failure', async () => {
    const turns = new Turns();
    const failed = turns.take('a', () => Promise.reject(new Error('no')));
    const next = turns.take('a', () => Promise.resolve(1));
    await expect(failed).rejects.toThrow('no');
    expect(await next).toBe(1);
  });
});
