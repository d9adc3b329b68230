import { describe, expect, it } from 'vitest';
import { electrodeCheck, nernstSlopeMv, phthalatePh, technicalBufferPh } from './ph-meter.js';

describe('pH meter', () => {
  it.each([
    [0, 54.2],
    [25, 59.16],
    [80, 70.07],
  ])('Nernst equation: %s °C is %s mV', (tempC, mv) => {
    expect(Math.abs(nernstSlopeMv(tempC) - mv)).toBeLessThan(0.02);
  });

  it.each([
    [25, 4.006],
    [0, 4.01],
    [40, 4.031],
  ])('Hetzer 1977: phthalate at %s °C is %s', (tempC, ph) => {
    expect(Math.abs(phthalatePh(tempC) - ph)).toBeLessThan(0.003);
  });

  it.each([
    ['seven', 0, 7.12],
    ['seven', 5, 7.09],
    ['seven', 20, 7.02],
    ['seven', 22.5, 7.01],
    ['seven', 25, 7.0],
    ['seven', 30, 6.99],
    ['seven', 40, 6.98],
    ['ten', 0, 10.32],
    ['ten', 20, 10.06],
    ['ten', 25, 10.01],
    ['ten', 40, 9.89],
  ] as const)('technical buffer table, MI 611-211: %s at %s °C is %s', (buffer, tempC, ph) => {
    expect(technicalBufferPh(buffer, tempC)).toBeCloseTo(ph, 9);
  });

  it('Nernst equation: tells a worn electrode from a shifted one', () => {
    const good = { ph1: 4.01, mv1: 177, ph2: 7, mv2: 0, tempC: 25 };
    expect(electrodeCheck(good)).toMatchObject({ verdict: 'good' });
    expect(electrodeCheck({ ...good, mv1: 150 })).toMatchObject({ verdict: 'slope' });
    expect(electrodeCheck({ ...good, mv1: 217, mv2: 40 })).toMatchObject({ verdict: 'offset', offsetMv: 40 });
    expect(() => electrodeCheck({ ...good, ph2: 4.01 })).toThrow(/Use 4.01 and 7.00/);
  });

  it('refuses a hot buffer', () => {
    expect(() => phthalatePh(80)).toThrow(RangeError);
    expect(() => technicalBufferPh('ten', -1)).toThrow(RangeError);
  });
});
