import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { missedChoices, type MissedCatch } from './missed-choices.js';

/** Ten kelvin a minute at 60 °C toward coolant of 15 °C, hops out at 30 °C, noticed at 48 °C. */
const missed: MissedCatch = {
  targetC: 60,
  nowC: 48,
  out: { tempC: 30 },
  massG: 60,
  surroundC: 15,
  rateCPerMin: -7.33,
  heat: {
    waterL: 20,
    roomC: 20,
    kettle: { volumeL: 30, diameterM: 0.34, massKg: 4, heaterPowerW: 3000, heaterEfficiency: 0.9 },
  },
};
const choiceOf = (kind: string, from = missed) => missedChoices(from).find(({ choice }) => choice === kind);

describe(missedChoices, () => {
  it('accepts with what is left of the contact', () => {
    // Newton: ln(45/15) against ln(33/15) at one constant.
    expect(choiceOf('accept')?.aromaRatio).toBeCloseTo(Math.log(33 / 15) / Math.log(45 / 15), 3);
    expect(choiceOf('accept')?.isoRatio).toBeLessThan(0.5);
  });

  it('holds as long as the contact is short', () => {
    const perS = 7.33 / 60 / 33;
    const shortS = (Math.log(45 / 15) - Math.log(33 / 15)) / perS;
    expect(Math.abs((choiceOf('hold')?.holdS ?? 0) - shortS)).toBeLessThanOrEqual(5);
    expect(choiceOf('hold')).toMatchObject({ aromaRatio: 1, extraG: null });
  });

  it('weighs in what makes up for it, and never more than as much again', () => {
    const more = choiceOf('more');
    expect(Number.isInteger(more?.extraG)).toBe(true);
    expect(Math.abs((60 + (more?.extraG ?? 0)) * (choiceOf('accept')?.aromaRatio ?? 0) - 60)).toBeLessThan(0.5);
    expect(choiceOf('more', { ...missed, nowC: 32 })).toBeUndefined();
  });

  it('says how long a reheat takes: energy over power', () => {
    // (20 kg of water * 4186 + 4 kg of steel * 500) J/K * 15 K / 2700 W
    const seconds = ((20 * 4186 + 4 * 500) * 15) / 2700;
    expect(choiceOf('reheat')?.reheatS).toBe(Math.round(seconds / 60) * 60);
    expect(choiceOf('reheat', { ...missed, heat: null })).toBeUndefined();
  });

  it('has an answer when it is too late for all of it', () => {
    const choices = missedChoices({ ...missed, nowC: 25, rateCPerMin: null });
    expect(choices.map(({ choice }) => choice)).toEqual(['hold', 'reheat', 'accept']);
    for (const { aromaRatio, isoRatio } of choices) expect(Number.isFinite(aromaRatio + isoRatio)).toBe(true);
  });

  it('asks nobody to reheat on a plate that would take hours', () => {
    const heat = { ...missed.heat!, kettle: { ...missed.heat!.kettle, heaterPowerW: 150 } };
    expect(choiceOf('reheat', { ...missed, heat })).toBeUndefined();
  });

  it('counts with a usual chiller when the liquid rises or stands still: no slope, no plan of days', () => {
    const usual = choiceOf('hold', { ...missed, rateCPerMin: null });
    for (const rateCPerMin of [1.5, 0, -0.02]) expect(choiceOf('hold', { ...missed, rateCPerMin })).toEqual(usual);
  });

  it('loses no contact where what goes in stands for its time: only the heat is less', () => {
    const timed = { ...missed, out: { standS: 600 } };
    expect(missedChoices(timed).map(({ choice }) => choice)).toEqual(['accept', 'reheat']);
    expect(choiceOf('accept', timed)?.aromaRatio).toBe(1);
    expect(choiceOf('accept', timed)?.isoRatio).toBeLessThan(0.5);
  });

  it('says first to accept when next to nothing is lost', () => {
    expect(missedChoices({ ...missed, nowC: 59.6 })[0]).toMatchObject({ choice: 'accept' });
    expect(missedChoices({ ...missed, nowC: 61, rateCPerMin: 1 }).map(({ choice }) => choice)).toEqual(['accept']);
  });

  it('whatever the watch sees: finite figures, each way once, accept among them, the plan never passed', () => {
    const anyMissed = fc.record({
      targetC: fc.double({ min: 25, max: 95, noNaN: true }),
      nowC: fc.double({ min: 1, max: 99, noNaN: true }),
      out: fc.oneof(
        fc.record({ tempC: fc.double({ min: 5, max: 90, noNaN: true }) }),
        fc.record({ standS: fc.double({ min: 10, max: 7200, noNaN: true }) }),
      ),
      massG: fc.double({ min: 0, max: 2000, noNaN: true }),
      surroundC: fc.double({ min: -5, max: 40, noNaN: true }),
      rateCPerMin: fc.option(fc.double({ min: -20, max: 5, noNaN: true })),
      heat: fc.option(
        fc.record({
          waterL: fc.double({ min: 0.1, max: 500, noNaN: true }),
          roomC: fc.constant(20),
          kettle: fc.record({
            volumeL: fc.constant(1),
            diameterM: fc.constant(0.1),
            massKg: fc.double({ min: 0.1, max: 100, noNaN: true }),
            heaterPowerW: fc.double({ min: 1, max: 20_000, noNaN: true }),
            heaterEfficiency: fc.double({ min: 0.1, max: 1, noNaN: true }),
          }),
        }),
      ),
    });
    fc.assert(
      fc.property(anyMissed, (from) => {
        const choices = missedChoices(from);
        const kinds = choices.map(({ choice }) => choice);
        expect(new Set(kinds).size).toBe(kinds.length);
        expect(kinds).toContain('accept');
        for (const { choice, holdS, extraG, reheatS, aromaRatio, isoRatio } of choices) {
          expect([aromaRatio, isoRatio].every((ratio) => Number.isFinite(ratio) && ratio >= 0)).toBe(true);
          expect([holdS, extraG, reheatS].filter((value) => value !== null)).toHaveLength(choice === 'accept' ? 0 : 1);
          if (holdS !== null) expect(holdS % 10 === 0 && holdS <= 2 * 3600 + 30).toBe(true);
          if (extraG !== null) expect(extraG).toBeLessThanOrEqual(from.massG * 1.05 + 0.6);
          if (reheatS !== null) expect(reheatS % 60 === 0 && reheatS >= 60).toBe(true);
        }
      }),
    );
  });
});
