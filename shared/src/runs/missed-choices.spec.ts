import { describe, expect, it } from 'vitest';
import { missedChoices, type MissedCatch } from './missed-choices.js';

/** Ten kelvin a minute at 60 °C toward coolant of 15 °C, hops out at 30 °C, noticed at 48 °C. */
const missed: MissedCatch = {
  targetC: 60,
  nowC: 48,
  outC: 30,
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
    expect(choiceOf('hold')?.holdS).toBeCloseTo((Math.log(45 / 15) - Math.log(33 / 15)) / perS, 0);
    expect(choiceOf('hold')).toMatchObject({ aromaRatio: 1, extraG: null });
  });

  it('weighs in what makes up for it, and never more than as much again', () => {
    const more = choiceOf('more');
    expect((60 + (more?.extraG ?? 0)) * (choiceOf('accept')?.aromaRatio ?? 0)).toBeCloseTo(60, 6);
    expect(choiceOf('more', { ...missed, nowC: 32 })).toBeUndefined();
  });

  it('says how long a reheat takes: energy over power', () => {
    // (20 kg of water * 4186 + 4 kg of steel * 500) J/K * 15 K / 2700 W
    expect(choiceOf('reheat')?.reheatS).toBeCloseTo(((20 * 4186 + 4 * 500) * 15) / 2700, 0);
    expect(choiceOf('reheat', { ...missed, heat: null })).toBeUndefined();
  });

  it('has an answer when it is too late for all of it', () => {
    const choices = missedChoices({ ...missed, nowC: 25, rateCPerMin: null });
    expect(choices.map(({ choice }) => choice)).toEqual(['hold', 'reheat', 'accept']);
    for (const { aromaRatio, isoRatio } of choices) expect(Number.isFinite(aromaRatio + isoRatio)).toBe(true);
  });
});
