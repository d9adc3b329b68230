import { band, type Band } from '../bands/band.js';
import { positive, within } from '../numeric/guard.js';

/** W/(m² K) of a still liquid over a 9.5 mm coil with 0.10 kg/s of coolant, by °C of the liquid. Computed. */
const STILL: readonly (readonly [number, number])[] = [
  [25, 480],
  [40, 790],
  [60, 1060],
  [82, 1300],
];
/** A rough handbook value for water, copper and water, which is far below. */
const STILL_LEAST = 340;
/** Stirred, with 3000 W/(m² K) taken outside. Computed. */
const STIRRED = { low: 1800, value: 2100, high: 2400 } as const;

function stillWPerM2K(tempC: number): number {
  const [first, last] = [STILL[0], STILL.at(-1)];
  const t = Math.min(last?.[0] ?? tempC, Math.max(first?.[0] ?? tempC, tempC));
  const after = Math.max(
    1,
    STILL.findIndex(([at]) => at >= t),
  );
  const [t1, u1] = STILL[after - 1] ?? [t, 0];
  const [t2, u2] = STILL[after] ?? [t, 0];
  return u1 + ((u2 - u1) * (t - t1)) / (t2 - t1);
}

/**
 * Heat transfer of an immersion coil before any of its traces has told better, W/K. Stirring matters most; what the coil is
 * made of hardly does. A still liquid lies in layers besides, and a probe in it does not show the mean.
 *
 * @param coil outer diameter above 0 mm and length above 0 m, stirred or not; liquid 0 to 100 °C (a stirred one does not mind).
 * @throws RangeError outside these ranges.
 * @see Churchill and Chu outside, Gnielinski inside (computed for 9.5 mm by 7.6 m); least value of a still one: overall
 * heat-transfer coefficients, Engineering ToolBox.
 * @example coilTransferWPerK({ outerMm: 9.5, lengthM: 7.6, stirred: true, tempC: 60 }).value // 476
 */
export function coilTransferWPerK(coil: { outerMm: number; lengthM: number; stirred: boolean; tempC: number }): Band {
  const tempC = within(coil.tempC, 'A liquid temperature', 0, 100, '°C');
  const areaM2 =
    (Math.PI * positive(coil.outerMm, 'A coil diameter', 'mm') * positive(coil.lengthM, 'A coil length', 'm')) / 1000;
  if (coil.stirred) return band(areaM2 * STIRRED.low, areaM2 * STIRRED.value, areaM2 * STIRRED.high, 'judged');
  const still = stillWPerM2K(tempC);
  return band(areaM2 * STILL_LEAST, areaM2 * still, areaM2 * still, 'judged');
}
