import { describe, expect, it } from 'vitest';
import { curveTempC } from '../figures/index.js';
import type { ChillerFacts, KettleFacts, RecipeDocument } from '../sheets/index.js';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { drinkPlanOf } from './drink-plan.js';
import { plannedDay } from './planned-day.js';
import type { DayMark, DeskKit, PlannedDay } from './types.js';

const kettle: KettleFacts = {
  volumeL: 35,
  diameterM: 0.36,
  massKg: 4,
  heaterPowerW: 3500,
  heaterEfficiency: 0.85,
  metal: 'stainless',
};
const chiller: ChillerFacts = { metal: 'copper', lengthM: 7.6, coolantC: 15 };
const kit: DeskKit = { altitudeM: 0, kettle, chiller };

function markOf(day: PlannedDay, kind: DayMark['kind'], id: string | null = null): DayMark {
  const found = day.marks.find((mark) => mark.kind === kind && mark.additionId === id);
  if (!found) throw new Error(`no mark ${kind} ${id}`);
  return found;
}
const minutes = (from: DayMark, to: DayMark) => (to.atMs - from.atMs) / 60_000;

describe('plannedDay', () => {
  it('goes through heat, coil, steep, fall and keg, with a mark for each', () => {
    const day = plannedDay(buildDocument(), kit);
    expect(day.never).toBeNull();
    expect(day.marks.map(({ kind, additionId }) => `${kind} ${additionId ?? ''}`.trim())).toEqual([
      'heat',
      'in citric',
      'in sencha',
      'out sencha',
      'chill',
      'in cascade',
      'out cascade',
      'transfer',
    ]);
    expect(markOf(day, 'in', 'sencha').tempC).toBeCloseTo(76, 0);
    expect(minutes(markOf(day, 'in', 'sencha'), markOf(day, 'out', 'sencha'))).toBeCloseTo(3, 6);
    expect(markOf(day, 'in', 'cascade').tempC).toBeCloseTo(62, 0);
    expect(markOf(day, 'transfer').tempC).toBeCloseTo(20, 6);
    expect(day.evaporatedL).toBeGreaterThan(0);
    for (const mark of day.marks) expect(curveTempC(day.curve, mark.atMs)).not.toBeNull();
  });

  it('heats water and metal with what reaches them (energy balance: 22 kg and 4 kg of steel, 61 K, 2975 W)', () => {
    const day = plannedDay(buildDocument({ assume: { fillC: 15 } }), { ...kit, chiller: null });
    const withoutLossMin = ((22 * 0.9982 * 4186 + 4 * 500) * (61 / 2975)) / 60;
    const heatedMin = minutes(markOf(day, 'heat'), markOf(day, 'in', 'sencha'));
    expect(heatedMin).toBeGreaterThan(withoutLossMin);
    expect(heatedMin).toBeLessThan(withoutLossMin * 1.1);
    const withCoil = plannedDay(buildDocument(), kit);
    expect(markOf(withCoil, 'in', 'sencha').atMs).toBeGreaterThan(markOf(day, 'in', 'sencha').atMs);
    const fromWarm = plannedDay(buildDocument({ assume: { fillC: 50 } }), kit);
    expect(markOf(fromWarm, 'in', 'sencha').atMs).toBeLessThan(markOf(withCoil, 'in', 'sencha').atMs / 2);
  });

  it('loses a few kelvin in a long lidded steep, and many in an open one (computed: 4 and 16 K in 30 min for 9.5 L)', () => {
    const long = (lidOn: boolean, from: Partial<KettleFacts> = {}) => {
      const document = buildDocument({
        waterL: 9.46,
        steepC: 82,
        additions: [buildTea({ massG: 1, out: { at: 'timer', durationS: 1800 } })],
        assume: { lidOn, roomC: 22 },
      });
      const small = { ...kettle, volumeL: 12, diameterM: 0.29, massKg: 2, ...from };
      const day = plannedDay(document, { altitudeM: 0, kettle: small, chiller });
      return markOf(day, 'in', 'sencha').tempC - markOf(day, 'out', 'sencha').tempC;
    };
    expect(long(true)).toBeGreaterThan(2.5);
    expect(long(true)).toBeLessThan(5);
    expect(long(false)).toBeGreaterThan(12);
    expect(long(false)).toBeLessThan(19);
    expect(long(true, { coolingConstantPerS: 2e-4 })).toBeCloseTo((82 - 22) * (1 - Math.exp(-0.36)), 0);
  });

  it('takes the chiller constant of the recipe, then the learned one, then one from the length of the coil', () => {
    const fallMin = (document: RecipeDocument, on: DeskKit) => {
      const day = plannedDay(document, on);
      return minutes(markOf(day, 'chill'), markOf(day, 'transfer'));
    };
    const plain = buildDocument({ additions: [], transferC: 30 });
    const newtonMin = (perS: number) => Math.log((76 - 15) / (30 - 15)) / perS / 60;
    expect(fallMin({ ...plain, assume: { chillerConstantPerS: 0.002 } }, kit)).toBeCloseTo(newtonMin(0.002), 3);
    const learned = { ...kit, chiller: { ...chiller, coolingConstantPerS: 0.001 } };
    expect(fallMin(plain, learned)).toBeCloseTo(newtonMin(0.001), 3);
    // UA 240 W/K and 0.1 kg/s take 183 W from each kelvin; the pot holds about 97 kJ/K.
    expect(fallMin(plain, kit)).toBeGreaterThan(newtonMin(182.7 / 95_000));
    expect(fallMin(plain, kit)).toBeLessThan(newtonMin(182.7 / 101_000));
    expect(fallMin(plain, { ...kit, chiller: { ...chiller, lengthM: 15 } })).toBeLessThan(fallMin(plain, kit));
    expect(fallMin({ ...plain, transferC: 30 }, { ...kit, chiller: null })).toBeGreaterThan(180);
  });

  it('lets contact times run while the fall goes on, and holds the keg for them', () => {
    const document = buildDocument({
      transferC: 40,
      additions: [
        buildHops({ id: 'early', in: { at: 'falling', tempC: 62 }, out: { at: 'timer', durationS: 60 } }),
        buildHops({ id: 'late', in: { at: 'falling', tempC: 45 }, out: { at: 'timer', durationS: 1200 } }),
      ],
    });
    const day = plannedDay(document, kit);
    expect(minutes(markOf(day, 'in', 'early'), markOf(day, 'out', 'early'))).toBeCloseTo(1, 6);
    expect(markOf(day, 'out', 'early').atMs).toBeLessThan(markOf(day, 'in', 'late').atMs);
    expect(minutes(markOf(day, 'in', 'late'), markOf(day, 'out', 'late'))).toBeCloseTo(20, 6);
    expect(markOf(day, 'out', 'late').tempC).toBeLessThan(25);
    expect(markOf(day, 'transfer').atMs).toBe(markOf(day, 'out', 'late').atMs);
  });

  it('never freezes: colder coolant holds the pot at 0 °C', () => {
    const additions = [buildHops({ in: { at: 'falling', tempC: 5 }, out: { at: 'timer', durationS: 20_000 } })];
    const icy = { ...kit, chiller: { ...chiller, coolantC: -4 } };
    const day = plannedDay(buildDocument({ transferC: 2, additions }), icy);
    expect(Math.min(...day.curve.map(({ tempC }) => tempC))).toBe(0);
    expect(minutes(markOf(day, 'in', 'cascade'), markOf(day, 'transfer'))).toBeCloseTo(20_000 / 60, 6);
  });

  it('says that water boils before it is hot enough, and plans at the boil', () => {
    const day = plannedDay(buildDocument({ steepC: 95 }), { ...kit, altitudeM: 3000 });
    expect(day.never).toEqual({ stage: 'heat', limitC: expect.closeTo(89.97, 1), wantedC: 95 });
    expect(markOf(day, 'in', 'sencha').tempC).toBeCloseTo(89.9, 0);
    // Weather moves the boiling point by less than a kelvin: 100 °C at the sea is the boil.
    expect(plannedDay(buildDocument({ steepC: 100 }), kit).never).toBeNull();
  });

  it('says that the heat is too weak, and that the coolant is too warm', () => {
    const weak = plannedDay(buildDocument(), { ...kit, kettle: { ...kettle, heaterPowerW: 60 } });
    expect(weak.never).toMatchObject({ stage: 'heat', wantedC: 76 });
    expect(weak.never?.limitC).toBeLessThan(76);
    const warm = plannedDay(buildDocument({ transferC: 12 }), kit);
    expect(warm.never).toEqual({ stage: 'chill', limitC: 15, wantedC: 12 });
    expect(markOf(warm, 'transfer').tempC).toBeCloseTo(17, 6);
    const alone = plannedDay(buildDocument({ transferC: 12 }), { ...kit, chiller: null });
    expect(alone.never).toMatchObject({ stage: 'chill' });
  });

  it('is a flat line for a cold steep, as long as the clock says', () => {
    const document = buildDocument({
      steepC: 6,
      additions: [
        buildTea({ out: { at: 'timer', durationS: 8 * 3600 } }),
        buildHops({ in: { at: 'transfer' }, out: { at: 'transfer' } }),
      ],
    });
    const day = plannedDay(document, kit);
    expect(day.curve.map(({ tempC }) => tempC)).toEqual([6, 6]);
    expect(markOf(day, 'out', 'sencha').atMs).toBe(8 * 3_600_000);
    expect(markOf(day, 'in', 'cascade').atMs).toBe(8 * 3_600_000);
    expect(day.marks.some(({ kind }) => kind === 'heat' || kind === 'chill')).toBe(false);
    expect(day.evaporatedL).toBe(0);
  });
});

describe('drinkPlanOf', () => {
  const planOf = (document: RecipeDocument) => drinkPlanOf(document, kit, plannedDay(document, kit));
  const acidAt = (at: RecipeDocument['additions'][number]['in']) =>
    buildDocument({
      additions: buildDocument().additions.map((one) => (one.kind === 'acid' ? { ...one, in: at } : one)),
    });

  it('blends the waters, and takes alkalinity in the form of the report', () => {
    const [ro] = buildDocument().waters;
    if (!ro) throw new Error('no water');
    const tap = {
      ...ro,
      id: 'tap',
      percent: 25,
      report: { ...ro.report, caMgPerL: 80, alkalinity: { as: 'caco3' as const, mgPerL: 200 } },
    };
    const { source } = planOf(buildDocument({ waters: [{ ...ro, percent: 75 }, tap] }));
    expect(source.ca).toBeCloseTo(20, 9);
    expect(source.hco3).toBeCloseTo(61, 0);
  });

  it('knows whether the acid meets the hops', () => {
    expect(planOf(buildDocument()).acidAfterHops).toBe(false);
    expect(planOf(acidAt({ at: 'falling', tempC: 70 })).acidAfterHops).toBe(false);
    expect(planOf(acidAt({ at: 'falling', tempC: 25 })).acidAfterHops).toBe(true);
    expect(planOf(acidAt({ at: 'transfer' })).acidAfterHops).toBe(true);
  });
});
