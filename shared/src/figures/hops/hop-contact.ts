import { checkedCurve, type TemperatureCurve } from '../curve/temperature-curve.js';
import { isomerisationPerMin, isomerisationTurns } from './isomerisation.js';

export interface HopContactTime {
  /** From hops in to hops out: what aroma and humulinones follow. */
  contactMin: number;
  meanC: number;
  /** What iso-alpha acids follow (isomerisationTurns). */
  turns: number;
}

/**
 * How long and how hot hops were in the liquid; null for a curve without time.
 *
 * @param curve from hops in to hops out, 0 to 130 °C.
 * @throws RangeError on a curve that is out of order or not finite.
 * @see time mean on straight lines; Malowicki and Shellhammer 2005 for the turns.
 */
export function hopContactTime(curve: TemperatureCurve): HopContactTime | null {
  checkedCurve(curve);
  const spanMs = (curve.at(-1)?.atMs ?? 0) - (curve[0]?.atMs ?? 0);
  if (spanMs <= 0) return null;
  let kelvinMs = 0;
  for (let index = 1; index < curve.length; index += 1) {
    const a = curve[index - 1];
    const b = curve[index];
    if (a && b) kelvinMs += ((a.tempC + b.tempC) / 2) * (b.atMs - a.atMs);
  }
  return { contactMin: spanMs / 60_000, meanC: kelvinMs / spanMs, turns: isomerisationTurns(curve) };
}

export interface LateHops {
  /** Contact as it will be over contact as planned. */
  contactRatio: number;
  /** The same for what makes iso-alpha acids. */
  turnsRatio: number;
  /** Hold so much longer before hops out, and the contact is as planned, s; 0 when it is long enough. */
  holdForContactS: number;
  /** Hold so long at `holdC` to make as much iso-alpha acid as planned, s; 0 when there is enough. */
  holdForTurnsS: number;
}

/**
 * What hops that went in late do, against the plan; for the choices of a missed catch.
 *
 * @param planned and `actual` from hops in to hops out.
 * @param holdC where it would be held, 0 to 130 °C.
 * @throws RangeError on a curve that is out of order, not finite, or without time.
 * @see hopContactTime.
 */
export function lateHops(planned: TemperatureCurve, actual: TemperatureCurve, holdC: number): LateHops {
  const plan = hopContactTime(planned);
  const real = hopContactTime(actual);
  if (!plan || !real) throw new RangeError('Hops must be in for some time, got none. Give a curve from in to out.');
  return {
    contactRatio: real.contactMin / plan.contactMin,
    turnsRatio: real.turns / plan.turns,
    holdForContactS: Math.max(0, plan.contactMin - real.contactMin) * 60,
    holdForTurnsS: (Math.max(0, plan.turns - real.turns) / isomerisationPerMin(holdC)) * 60,
  };
}
