import { describe, expect, it } from 'vitest';
import { corrected } from './corrected.js';

const correction = { slope: 1.01, offsetC: -0.5 };
const at = (...temps: (number | null)[]) => temps.map((tempC, atMs) => ({ atMs, tempC }));

describe('corrected', () => {
  it('corrects temperatures and keeps what was sent', () => {
    const [row] = corrected(at(60), correction, null);
    expect(row).toEqual({ atMs: 0, tempC: expect.closeTo(60.1, 9), rawC: 60 });
    expect(corrected(at(60), null, null)).toEqual([{ atMs: 0, tempC: 60, rawC: null }]);
  });

  it('leaves codes of drivers as they are, so that the watch knows them again', () => {
    for (const code of [null, -127, 85, 127.9])
      expect(corrected(at(20, code), correction, null)[1]).toEqual({ atMs: 1, tempC: code, rawC: null });
  });

  it('takes 85.0 for a temperature when the probe was near it before', () => {
    expect(corrected(at(85), correction, 84.9)[0]?.rawC).toBe(85);
    expect(corrected(at(84.9, -127, 85), correction, null)[2]?.rawC).toBe(85);
  });
});
