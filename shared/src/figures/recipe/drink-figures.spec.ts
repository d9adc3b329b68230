import { describe, expect, it } from 'vitest';
import { planCurve } from '../curve/planned-curve.js';
import { pureWater } from '../water/ions.js';
import { steepVerdict } from '../tea/steep-dose.js';
import { drinkFigures } from './drink-figures.js';
import type { DrinkPlan } from './drink-plan.js';

/**
 * The worked example: 20 L of pure water, calcium chloride dihydrate 6 g, gypsum 2.4 g, citric acid 7 g; 100 g of white tea in
 * at 82 °C for 4 min; chiller on; 60 g of hops in at 60 °C, out at 30 °C, falling at 0.08 a minute toward 15 °C.
 */
const chiller = { kind: 'cool', surroundC: 15, kPerS: 0.08 / 60 } as const;
const day = planCurve(82, [
  { id: 'steep', kind: 'hold', durationS: 240 },
  { id: 'chill', ...chiller, toC: 60 },
  { id: 'hops', ...chiller, toC: 30 },
]);
const [steep, , hopStage] = day.marks;
const plan: DrinkPlan = {
  waterL: 20,
  source: pureWater,
  salts: [
    { salt: 'calciumChlorideDihydrate', massG: 6 },
    { salt: 'gypsum', massG: 2.4 },
  ],
  acids: [{ acid: 'citricAnhydrous', massG: 7 }],
  teas: [{ kind: 'white', form: 'whole', massG: 100, inAtMs: steep?.fromMs ?? 0, outAtMs: steep?.toMs ?? 0 }],
  hops: [{ massG: 60, alphaPercent: 9, inAtMs: hopStage?.fromMs ?? 0, outAtMs: hopStage?.toMs ?? 0 }],
  curve: day.curve,
  evaporatedL: 0.05,
  deadSpaceL: 0,
  servingMl: 355,
  gas: { volumes: 3, tempC: 4 },
};
const figures = drinkFigures(plan);
const near = (value: number | undefined, expected: number, within: number) =>
  expect(Math.abs((value ?? Number.NaN) - expected)).toBeLessThanOrEqual(within);

describe('the worked example, whole chain', () => {
  it('water (stoichiometry)', () => {
    near(figures.water.ions.ca, 109.7, 0.1);
    near(figures.water.ions.cl, 144.7, 0.1);
    near(figures.water.ions.so4, 67.0, 0.1);
    near(figures.water.balance.cationsMeqPerL, 5.475, 0.001);
    near(figures.water.balance.anionsMeqPerL, 5.475, 0.001);
    near(figures.water.chlorideSulfate.byIonMass ?? 0, 2.16, 0.005);
    near(figures.water.chlorideSulfate.bySaltMass ?? 0, 2.5, 1e-9);
    near(figures.water.hardnessAsCaCo3, 274, 0.5);
    near(figures.water.ionicStrength, 0.0089, 0.00005);
    near(figures.water.conductivityUsPerCm, 685, 7);
  });

  it('acid (Goldberg 2002, Davies; leaf a judgement with a factor of two)', () => {
    const acid = figures.acid!;
    near(acid.lemonJuiceMl, 146, 1);
    near(acid.phAfterAcid, 3.08, 0.01);
    near(acid.teaBaseMeqPerL, 0.935, 0.002);
    near(acid.hopBaseMeqPerL, 1.92, 0.002);
    near(acid.phAfterTea.value, 3.33, 0.01);
    near(acid.phAfterTea.low, 3.23, 0.01);
    near(acid.phAfterTea.high, 3.5, 0.01);
    near(acid.phStill.value, 3.78, 0.01);
    near(acid.phStillComplexed, 3.72, 0.01);
    near(acid.phStill.low, 3.53, 0.02);
    near(acid.phStill.high, 4.09, 0.02);
    near(acid.phCarbonated.value, 3.67, 0.01);
    near(acid.phCarbonatedServed.value, 3.72, 0.01);
    near(acid.phCarbonatedServed.low, 3.5, 0.01);
    near(acid.phCarbonatedServed.high, 3.98, 0.02);
  });

  it('tea (Jaganyi and Price 1999, J. Tea Sci. Res. 2024; rates a judgement with a factor of two)', () => {
    const { steeps, caffeineMgPerL, caffeineServingMg, caffeineLine } = figures.tea;
    near(steeps[0]?.steepDoseMin, 4.28, 0.02);
    expect(steeps[0]).toMatchObject({ verdict: 'good', linesHold: true });
    near(steeps[0]?.polyphenolRatio.value, 0.72, 0.005);
    near(steeps[0]?.polyphenolRatio.low, 0.47, 0.005);
    near(steeps[0]?.polyphenolRatio.high, 0.92, 0.005);
    near(caffeineMgPerL.value, 139, 1);
    near(caffeineMgPerL.low, 86, 6);
    near(caffeineMgPerL.high, 192, 7);
    near(caffeineServingMg.value, 50, 1);
    expect(caffeineLine).toBe('crosses');
  });

  it('leaf left in to 30 °C: 11.4, still in the white window', () => {
    const left = drinkFigures({ ...plan, teas: plan.teas.map((tea) => ({ ...tea, outAtMs: hopStage?.toMs ?? 0 })) });
    near(left.tea.steeps[0]?.steepDoseMin, 11.4, 0.1);
    near(left.tea.steeps[0]?.polyphenolRatio.value, 0.97, 0.005);
    expect(left.tea.steeps[0]?.verdict).toBe('good');
    expect(steepVerdict('green', left.tea.steeps[0]?.steepDoseMin ?? 0)).toBe('amber');
    // All that 0.90 of 35 mg/g can give.
    near(left.tea.caffeineMgPerL.value / (5 * 35 * 0.9), 1, 0.01);
  });

  it('hops (Malowicki and Shellhammer 2005, Maye 2015; solubility a judgement with a factor of three)', () => {
    const hops = figures.hops!;
    near(hops.alphaMgPerL, 270, 1);
    near(hops.isoMgPerL.value, 0.014, 0.001);
    near(hops.isoMgPerL.low, 0.003, 0.001);
    near(hops.isoMgPerL.high, 0.05, 0.01);
    near(hops.humulinoneMgPerL.value, 8.4, 0.05);
    near(hops.humulinoneMgPerL.low, 4.8, 0.4);
    near(hops.humulinoneMgPerL.high, 12.7, 0.5);
    near(hops.alphaDissolvedMgPerL.value, 6, 0.7);
    near(hops.bitternessIndex.value, 6.1, 0.15);
    near(hops.bitternessIndex.low, 3.7, 0.4);
    near(hops.bitternessIndex.high, 9.4, 0.5);
    expect(hops.word).toBe('soft');
  });

  it.each([
    ['in at 82 °C before the chill', 0, false, 0.14, 0.01],
    ['held 20 min at 82 °C', 1200, false, 1.6, 0.05],
    ['held 20 min at 82 °C, acid after', 1200, true, 3.1, 0.2],
  ])('hops %s (Malowicki and Shellhammer 2005 and judgement)', (_name, heldS, acidAfterHops, iso, within) => {
    const other = planCurve(82, [
      { id: 'steep', kind: 'hold', durationS: 240 },
      { id: 'held', kind: 'hold', durationS: heldS },
      { id: 'chill', ...chiller, toC: 30 },
    ]);
    const inAtMs = other.marks[1]?.fromMs ?? 0;
    const outAtMs = (heldS > 0 ? other.marks[1]?.toMs : other.marks[2]?.toMs) ?? 0;
    const changed = drinkFigures({
      ...plan,
      curve: other.curve,
      acidAfterHops,
      hops: [{ ...plan.hops[0]!, inAtMs, outAtMs }],
    });
    near(changed.hops?.isoMgPerL.value, iso, within);
  });

  it('yield, haze and gas', () => {
    near(figures.yield.value, 19.1, 0.05);
    near(figures.yield.leafL, 0.4, 1e-9);
    near(figures.yield.hopsL, 0.42, 1e-9);
    expect(figures.haze).toContainEqual({ kind: 'calcium', level: 'amber' });
    near(figures.gas.gaugeKPa ?? 0, 107.9, 2.5);
  });

  it('gives no pH for water whose report cannot be right, and all the rest', () => {
    const wrong = drinkFigures({ ...plan, source: { ...pureWater, na: 300 } });
    const sea = { ca: 412, mg: 1290, na: 10_770, k: 399, cl: 19_350, so4: 2712, hco3: 142 };
    expect(drinkFigures({ ...plan, source: sea })).toMatchObject({ acid: null, water: { salinity: 'salt' } });
    expect(wrong.acid).toBeNull();
    expect(wrong.hops).toBeNull();
    expect(wrong.tea.caffeineMgPerL.value).toBeGreaterThan(100);
  });

  it('judgement: a measured pH leaves 0.1 of band, herbs have three times', () => {
    const learned = drinkFigures({
      ...plan,
      teas: plan.teas.map((tea) => ({ ...tea, isBaseMeasured: true })),
      hops: plan.hops.map((hops) => ({ ...hops, isBaseMeasured: true })),
    }).acid!.phStill;
    near(learned.value, figures.acid!.phStill.value, 1e-12);
    near(learned.low, learned.value - 0.1, 1e-12);
    near(learned.high, learned.value + 0.1, 1e-12);
    const half = drinkFigures({ ...plan, teas: plan.teas.map((tea) => ({ ...tea, isBaseMeasured: true })) }).acid!
      .phStill;
    expect(half.high).toBeLessThan(figures.acid!.phStill.high);
    expect(half.high).toBeGreaterThan(learned.high);
    const herbs = drinkFigures({ ...plan, teas: plan.teas.map((tea) => ({ ...tea, kind: 'herbal' as const })) });
    expect(herbs.acid!.phAfterTea.value).toBe(figures.acid!.phAfterTea.value);
    expect(herbs.acid!.phAfterTea.high).toBeGreaterThan(figures.acid!.phAfterTea.high + 0.1);
  });

  it('takes a night in the fridge for a cold steep, and leaf without caffeine for what it is', () => {
    const night = [
      { atMs: 0, tempC: 5 },
      { atMs: 12 * 3_600_000, tempC: 5 },
    ];
    const leaf = { form: 'whole', massG: 100, inAtMs: 0, outAtMs: 12 * 3_600_000 } as const;
    const cold = drinkFigures({ ...plan, curve: night, teas: [{ kind: 'green', ...leaf }], hops: [] }).tea;
    expect(cold.steeps[0]?.linesHold).toBe(false);
    near(cold.caffeineMgPerL.value / (5 * 27 * 0.9), 1, 0.03);
    const herbs = drinkFigures({ ...plan, curve: night, teas: [{ kind: 'herbal', ...leaf }] }).tea;
    expect(herbs).toMatchObject({ caffeineMgPerL: { low: 0, value: 0, high: 0 }, caffeineLine: 'below' });
  });

  it('gives all figures of hard water that the acid cannot turn, and of a jar of chalk', () => {
    const hard = { ca: 140, mg: 25, na: 30, k: 3, cl: 60, so4: 80, hco3: 430 };
    for (const other of [
      { ...plan, source: hard, acidAfterHops: true },
      { ...plan, salts: [{ salt: 'calciumCarbonate', massG: 20 }] } as const,
      { ...plan, acids: [{ acid: 'citricAnhydrous', massG: 4000 }] } as const,
    ]) {
      const { acid, hops } = drinkFigures(other);
      expect(acid?.phStill.low).toBeLessThanOrEqual(acid?.phStill.high ?? 0);
      expect(hops?.bitternessIndex.value).toBeGreaterThan(3);
    }
    near(drinkFigures({ ...plan, source: hard }).acid?.phStill.value, 8.3, 0.15);
  });

  it('works with nothing in it, and never flickers', () => {
    const empty = drinkFigures({ ...plan, salts: [], acids: [], teas: [], hops: [] });
    expect(empty.tea.caffeineMgPerL.high).toBe(0);
    expect(empty.hops?.bitternessIndex.value).toBe(0);
    expect(empty.tea.caffeineLine).toBe('below');
    expect(drinkFigures(plan)).toEqual(figures);
  });

  it('refuses bad input with what to do', () => {
    expect(() => drinkFigures({ ...plan, waterL: 0 })).toThrow(/above 0/);
    expect(() => drinkFigures({ ...plan, hops: [{ ...plan.hops[0]!, alphaPercent: 90 }] })).toThrow(RangeError);
    expect(() => drinkFigures({ ...plan, teas: [{ ...plan.teas[0]!, massG: Number.NaN }] })).toThrow(RangeError);
  });
});
