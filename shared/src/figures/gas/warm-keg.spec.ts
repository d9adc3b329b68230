import { describe, expect, it } from 'vitest';
import { chargeGaugeKPa } from './charge-pressure.js';
import { allowedGaugeKPa, warmKegGaugeKPa } from './warm-keg.js';

const keg = { drinkL: 18, headspaceL: 1, volumes: 2.7, closedAtC: 3 };

describe('a closed keg that warms', () => {
  it.each([
    [2.7, 3, 79.7],
    [2.7, 10, 130],
    [2.7, 20, 214],
    [2.7, 30, 307],
    [2.7, 40, 406],
    [3.5, 20, 308],
    [3.5, 30, 430],
  ])('Weiss 1974 and gas law, computed: %s volumes at %s °C are %s kPa gauge', (volumes, tempC, gaugeKPa) => {
    const answer = warmKegGaugeKPa({ ...keg, volumes }, tempC) ?? 0;
    expect(Math.abs(answer / gaugeKPa - 1)).toBeLessThan(0.025);
  });

  it('Weiss 1974 and gas law, computed: half full it is milder, 221 kPa at 40 °C', () => {
    const half = warmKegGaugeKPa({ ...keg, drinkL: 9, headspaceL: 10 }, 40) ?? 0;
    expect(Math.abs(half / 221 - 1)).toBeLessThan(0.025);
  });

  it('is the charge pressure again at the old temperature, and with no headspace', () => {
    expect(warmKegGaugeKPa(keg, 3)).toBeCloseTo(chargeGaugeKPa({ volumes: 2.7, tempC: 3 }) ?? 0, 6);
    expect(warmKegGaugeKPa({ ...keg, headspaceL: 0 }, 20)).toBeCloseTo(
      chargeGaugeKPa({ volumes: 2.7, tempC: 20 }) ?? 0,
      -1,
    );
  });

  it('says so when it leaves the model, and refuses bad input', () => {
    expect(warmKegGaugeKPa({ ...keg, volumes: 7.5 }, 40)).toBeNull();
    expect(() => warmKegGaugeKPa(keg, 50)).toThrow(RangeError);
    expect(() => warmKegGaugeKPa({ ...keg, drinkL: 0 }, 20)).toThrow(RangeError);
  });

  it('DIN 6647-1: 3 bar when nothing is stamped, and says that it is assumed', () => {
    expect(allowedGaugeKPa(null)).toEqual({ gaugeKPa: 300, assumed: true });
    expect(allowedGaugeKPa(896)).toEqual({ gaugeKPa: 896, assumed: false });
    expect(() => allowedGaugeKPa(0)).toThrow(RangeError);
  });
});
