import { describe, expect, it } from 'vitest';
import { planCurve } from '../curve/planned-curve.js';
import { hopContactTime, lateHops } from './hop-contact.js';
import { isomerisationPerMin } from './isomerisation.js';

const fall = (fromC: number) =>
  planCurve(fromC, [{ id: 'hops', kind: 'cool', surroundC: 15, kPerS: 0.08 / 60, toC: 30 }]).curve;

describe('hop contact', () => {
  it('Malowicki and Shellhammer 2005: 60 to 30 °C in 13.73 min is worth 3.03 min at 60 °C', () => {
    const contact = hopContactTime(fall(60));
    expect(contact?.contactMin).toBeCloseTo(13.73, 2);
    expect(Math.abs((contact?.turns ?? 0) / isomerisationPerMin(60) - 3.03)).toBeLessThan(0.02);
    expect(contact?.meanC).toBeGreaterThan(30);
    expect(contact?.meanC).toBeLessThan(60);
  });

  it('hops that are ten degrees late lose little contact and half the iso, and can be held for it', () => {
    const late = lateHops(fall(60), fall(50), 50);
    expect(late.contactRatio).toBeCloseTo(Math.log(35 / 15) / Math.log(45 / 15), 6);
    expect(late.turnsRatio).toBeLessThan(0.5);
    const held = planCurve(50, [
      { id: 'hold', kind: 'hold', durationS: late.holdForTurnsS },
      { id: 'hops', kind: 'cool', surroundC: 15, kPerS: 0.08 / 60, toC: 30 },
    ]).curve;
    expect(lateHops(fall(60), held, 50).turnsRatio).toBeCloseTo(1, 6);
    expect(lateHops(fall(50), fall(60), 50)).toMatchObject({ holdForContactS: 0, holdForTurnsS: 0 });
  });

  it('has none without time', () => {
    expect(hopContactTime([])).toBeNull();
    expect(() => lateHops([], fall(50), 50)).toThrow(/from in to out/);
  });
});
