import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { atmosphericPressureKPa } from '../heat/atmospheric-pressure.js';
import { chargeGaugeKPa, equilibriumAbsoluteKPa } from './charge-pressure.js';
import { co2GPerL } from './co2-solubility.js';

const temps = [0, 2, 4, 6, 8, 10, 15, 20];
const table: [number, number[]][] = [
  [2.0, [17.6, 27.4, 37.7, 48.4, 59.7, 71.5, 102.9, 137.2]],
  [2.5, [47.5, 59.8, 72.7, 86.2, 100.3, 115.0, 154.4, 197.5]],
  [3.0, [77.6, 92.4, 107.9, 124.1, 141.1, 158.9, 206.4, 258.2]],
  [3.5, [107.8, 125.1, 143.3, 162.3, 182.2, 203.0, 258.6, 319.4]],
  [4.0, [138.2, 158.0, 178.9, 200.7, 223.6, 247.4, 311.3, 381.1]],
];
const cases = table.flatMap(([volumes, row]) => row.map((kPa, i) => [volumes, temps[i] ?? 0, kPa] as const));

describe('chargeGaugeKPa', () => {
  it.each(cases)(
    'Weiss 1974, computed: %s volumes at %s °C need %s kPa gauge at sea level',
    (volumes, tempC, gaugeKPa) => {
      const answer = (chargeGaugeKPa({ volumes, tempC }) ?? 0) + 101.325;
      expect(Math.abs(answer / (gaugeKPa + 101.325) - 1)).toBeLessThan(0.012);
    },
  );

  it('Weiss 1974 and U.S. Standard Atmosphere 1976: 90.5 kPa gauge for 2.5 volumes at 4 °C and 1600 m', () => {
    const stationKPa = atmosphericPressureKPa(1600);
    const answer = (chargeGaugeKPa({ volumes: 2.5, tempC: 4, stationKPa }) ?? 0) + stationKPa;
    expect(Math.abs(answer / (90.5 + 83.52) - 1)).toBeLessThan(0.012);
  });

  it('comes back to the content', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 15, noNaN: true }),
        fc.double({ min: 0, max: 40, noNaN: true }),
        (gPerL, tempC) => {
          const kPa = equilibriumAbsoluteKPa(gPerL, tempC);
          if (kPa !== null) expect(co2GPerL(tempC, kPa)).toBeCloseTo(gPerL, 8);
        },
      ),
    );
  });

  it('says so when no pressure is enough, and refuses NaN', () => {
    expect(chargeGaugeKPa({ volumes: 9, tempC: 40 })).toBeNull();
    expect(() => chargeGaugeKPa({ volumes: Number.NaN, tempC: 4 })).toThrow(RangeError);
    expect(() => chargeGaugeKPa({ volumes: 2.5, tempC: 60 })).toThrow(RangeError);
  });
});
