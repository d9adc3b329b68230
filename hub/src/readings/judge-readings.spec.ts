import { describe, expect, it } from 'vitest';
import { judgeReadings } from './judge-readings.js';

const NOW = 1_764_595_200_000;
const DAY_MS = 24 * 3_600_000;

describe(judgeReadings, () => {
  it('keeps what a probe says, codes of its driver included', () => {
    const codes = [null, -127, 85, 0, 1000, -1000].map((tempC, index) => ({ atMs: NOW - index, tempC }));
    expect(judgeReadings(codes, NOW)).toEqual({ accepted: codes, refused: [] });
  });

  it('refuses by itself what is from the future, too old, or no temperature, and says which', () => {
    const readings = [
      { atMs: NOW + 60_000, tempC: 70 },
      { atMs: NOW + 60_001, tempC: 70 },
      { atMs: NOW - 30 * DAY_MS, tempC: 70 },
      { atMs: NOW - 30 * DAY_MS - 1, tempC: 70 },
      { atMs: NOW, tempC: 1000.1 },
      { atMs: NOW, tempC: -1e9 },
    ];
    const { accepted, refused } = judgeReadings(readings, NOW);
    expect(accepted).toEqual([readings[0], readings[2]]);
    expect(refused).toEqual([
      { index: 1, reason: 'in-the-future' },
      { index: 3, reason: 'too-old' },
      { index: 4, reason: 'out-of-range' },
      { index: 5, reason: 'out-of-range' },
    ]);
  });
});
