import { describe, expect, it } from 'vitest';
import { curveTempC } from './temperature-curve.js';
import { planCurve, type PlannedStage } from './planned-curve.js';

const heat: PlannedStage = {
  id: 'heat',
  kind: 'heat',
  toC: 82,
  heatCapacityJPerK: 43_110,
  powerW: 2000,
  efficiency: 0.9,
  lossWPerK: 6,
  roomC: 20,
};
const day: PlannedStage[] = [
  heat,
  { id: 'coil', kind: 'mix', toC: 80 },
  { id: 'steep', kind: 'hold', durationS: 240 },
  { id: 'rest', kind: 'fall', referenceC: 20, fallCPerS: 0.01, exponent: 2.1, durationS: 120 },
  { id: 'chill', kind: 'cool', surroundC: 15, kPerS: 0.08 / 60, toC: 30 },
];

describe('planCurve', () => {
  it('joins heating, a cold coil, a steep, a rest and a chill', () => {
    const plan = planCurve(20, day);
    expect(plan.kind).toBe('planned');
    const [first, coil, steep, rest, chill] = plan.marks;
    expect((first?.toMs ?? 0) / 1000).toBeCloseTo(1663, -0.3);
    expect(coil).toMatchObject({
      fromC: expect.closeTo(82, 9) as number,
      toC: 80,
      fromMs: first?.toMs,
      toMs: first?.toMs,
    });
    expect(curveTempC(plan.curve, (steep?.fromMs ?? 0) + 60_000)).toBe(80);
    expect(rest?.toC).toBeLessThan(80);
    expect(chill?.toC).toBeCloseTo(30, 6);
    const middle = ((chill?.fromMs ?? 0) + (chill?.toMs ?? 0)) / 2;
    const exact = 15 + ((chill?.fromC ?? 0) - 15) * Math.exp((-0.08 / 60_000) * (middle - (chill?.fromMs ?? 0)));
    expect(Math.abs((curveTempC(plan.curve, middle) ?? 0) - exact)).toBeLessThan(0.01);
  });

  it("Newton's law, computed: 82 to 60 °C in 4.98 min and on to 30 °C in 13.73 min", () => {
    const chiller = { kind: 'cool', surroundC: 15, kPerS: 0.08 / 60 } as const;
    const plan = planCurve(82, [
      { id: 'a', ...chiller, toC: 60 },
      { id: 'b', ...chiller, toC: 30 },
    ]);
    expect(((plan.marks[0]?.toMs ?? 0) - (plan.marks[0]?.fromMs ?? 0)) / 60_000).toBeCloseTo(4.98, 2);
    expect(((plan.marks[1]?.toMs ?? 0) - (plan.marks[1]?.fromMs ?? 0)) / 60_000).toBeCloseTo(13.73, 2);
  });

  it('says which stage never gets there, and keeps what comes before', () => {
    const weak = planCurve(20, [{ ...heat, powerW: 300 }]);
    expect(weak).toMatchObject({ kind: 'never', stageId: 'heat', limitC: 65, marks: [] });
    const cold = planCurve(20, [heat, { id: 'fridge', kind: 'cool', surroundC: 6, kPerS: 1e-4, toC: 5 }]);
    expect(cold).toMatchObject({ kind: 'never', stageId: 'fridge', limitC: 6 });
    expect(cold.marks).toHaveLength(1);
  });

  it('refuses a start that is no number, and a negative hold', () => {
    expect(() => planCurve(Number.NaN, [])).toThrow(RangeError);
    expect(() => planCurve(20, [{ id: 'x', kind: 'hold', durationS: -1 }])).toThrow(RangeError);
  });
});
