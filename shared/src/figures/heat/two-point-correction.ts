import { finite, notNegative, positive, within } from '../numeric/guard.js';

export interface ProbeCorrection {
  /** Added after the slope, K. */
  offsetC: number;
  slope: number;
}

export type TwoPointResult =
  | { kind: 'accepted'; correction: ProbeCorrection }
  /** A pair this far off means another probe, or a bad bath: nothing is stored. */
  | { kind: 'refused'; reason: 'slope' | 'offset'; correction: ProbeCorrection };

const SLOPE_FROM = 0.97;
const SLOPE_TO = 1.03;
const OFFSET_WITHIN_K = 2;

/**
 * Linear correction of a probe from its reading in an ice bath and at a rolling boil; refused when the slope is outside 0.97
 * to 1.03 or the offset is above 2 K.
 *
 * @param iceReadingC what it showed in the ice bath (true value 0.00 °C).
 * @param boilReadingC what it showed at the boil.
 * @param boilC the true boiling point there, above 0 °C (boilingPointC).
 * @throws RangeError when an input is not finite, or both readings are the same.
 * @see straight line through two points; ice bath as in ASTM E563.
 * @example twoPointCorrection(0.4, 97.9, 98.31) // slope 1.0083, offset -0.40
 */
export function twoPointCorrection(iceReadingC: number, boilReadingC: number, boilC: number): TwoPointResult {
  const span = finite(boilReadingC, 'A boil reading', '°C') - finite(iceReadingC, 'An ice reading', '°C');
  if (span === 0) throw new RangeError(`Two readings must differ, got ${iceReadingC} twice. Read ice and boil again.`);
  const slope = positive(boilC, 'A boiling point', '°C') / span;
  const offsetC = -slope * iceReadingC;
  const correction = { slope, offsetC };
  if (!(slope >= SLOPE_FROM && slope <= SLOPE_TO)) return { kind: 'refused', reason: 'slope', correction };
  if (Math.abs(offsetC) > OFFSET_WITHIN_K) return { kind: 'refused', reason: 'offset', correction };
  return { kind: 'accepted', correction };
}

/** A reading after correction, °C. @throws RangeError when the reading or the correction is not finite. */
export function correctedTempC(readingC: number, correction: ProbeCorrection): number {
  const slope = within(correction.slope, 'A slope', 0, 10);
  return finite(correction.offsetC, 'An offset', 'K') + slope * finite(readingC, 'A reading', '°C');
}

/**
 * Standard uncertainty of a corrected temperature from those of the two baths, K.
 *
 * @param tempC the temperature, °C.
 * @param baths boiling point above 0 °C; uncertainties of 0 K or more.
 * @throws RangeError outside these ranges.
 * @see propagation through a straight line.
 */
export function correctionUncertaintyK(
  tempC: number,
  { boilC, iceK, boilK }: { boilC: number; iceK: number; boilK: number },
): number {
  const share = finite(tempC, 'A temperature', '°C') / positive(boilC, 'A boiling point', '°C');
  return Math.hypot(
    (1 - share) * notNegative(iceK, 'An uncertainty', 'K'),
    share * notNegative(boilK, 'An uncertainty', 'K'),
  );
}
