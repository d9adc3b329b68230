import { describe, expect, it } from 'vitest';
import { linePoints, stretchesOf } from './liquid-line.ts';

const MINUTE = 60_000;

describe(linePoints, () => {
  it('leaves out what is no temperature of water', () => {
    const readings = [20, null, -127, 21, 85, 22, 400].map((tempC, i) => ({ atMs: i * 1000, tempC }));
    expect(linePoints(readings).map(({ tempC }) => tempC)).toEqual([20, 21, 22]);
  });

  it('keeps 85 °C on the way through it', () => {
    const readings = [84.5, 85, 85.5].map((tempC, i) => ({ atMs: i * 1000, tempC }));
    expect(linePoints(readings)).toHaveLength(3);
  });
});

describe(stretchesOf, () => {
  const day = Array.from({ length: 100 }, (_, minute) => {
    const tempC = minute < 50 ? 20 + minute * 1.2 : minute < 60 ? 80 : 80 - (minute - 60) * 1.5;
    // A probe's noise must not make the hue flicker.
    return { atMs: minute * MINUTE, tempC: tempC + (minute % 2) * 0.05 };
  });

  it('tells climbing, holding and falling apart', () => {
    expect(stretchesOf(day).map(({ doing }) => doing)).toEqual(['climbing', 'holding', 'falling']);
  });

  it('covers the whole line without a gap', () => {
    const stretches = stretchesOf(day);
    expect(stretches[0]?.fromMs).toBe(0);
    expect(stretches.at(-1)?.toMs).toBe(99 * MINUTE);
    stretches.slice(1).forEach(({ fromMs }, i) => expect(fromMs).toBe(stretches[i]?.toMs));
  });

  it('says nothing of no line', () => {
    expect(stretchesOf([])).toEqual([]);
    expect(stretchesOf([{ atMs: 1, tempC: 20 }])).toEqual([]);
  });
});
