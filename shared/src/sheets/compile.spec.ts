import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildDocument, buildHops, buildTea } from '../testing/index.js';
import { recipeDocuments } from '../testing/recipe-arbitraries.js';
import { compileSheet } from './compile.js';
import type { RecipeDocument } from './recipe.js';
import { runSheetSchema } from './step.js';

const document = buildDocument({
  additions: [
    {
      id: 'cacl2',
      kind: 'salt',
      name: 'calcium chloride',
      massG: 3.2,
      keeps: 'g-per-l',
      salt: 'calciumChlorideDihydrate',
      in: { at: 'fill' },
    },
    ...buildDocument().additions,
  ],
  gas: { volumes: 2.5, tempC: 4 },
  targets: { waterPh: { min: 4, max: 4.3 } },
});
const kit = { altitudeM: 0, reachS: 12 };
const stepOf = (id: string, from = document, on = kit) => compileSheet(from, on).steps.find((step) => step.id === id);

describe(compileSheet, () => {
  it('keeps the order of the day', () => {
    const ids = compileSheet(document, kit).steps.map(({ id }) => id);
    const order = [
      'fill',
      'light-heat',
      'ph',
      'heat',
      'tea-in',
      'steep',
      'tea-out',
      'chill',
      'hops-in',
      'hops-out',
      'transfer',
      'gas',
    ];
    expect(ids.filter((id) => order.includes(id))).toEqual(order);
  });

  it('carries levels, times, amounts and this person’s reach', () => {
    expect(stepOf('heat')?.done).toEqual({ by: 'temperature', direction: 'rising', tempC: 76 });
    expect(stepOf('steep')?.done).toEqual({ by: 'timer', durationS: 180 });
    expect(stepOf('hops-in')).toMatchObject({
      kind: 'catch',
      start: { by: 'temperature', direction: 'falling', tempC: 62 },
      amounts: [{ name: 'Cascade', massG: 60, bag: 'bag 2' }],
      reachS: 12,
    });
    expect(stepOf('ph')?.done).toEqual({ by: 'measurement', quantity: 'pH', min: 4, max: 4.3 });
  });

  it('computes the gas for this drink, its temperature and the altitude', () => {
    const gaugeKPa = (altitudeM: number) => stepOf('gas', document, { ...kit, altitudeM })?.settings[0]?.value;
    // 72.7 kPa at sea level and 90.5 kPa at 1600 m: the solubility of Weiss 1974, solved for pressure.
    expect(gaugeKPa(0)).toBe(73);
    expect(gaugeKPa(1600)).toBeGreaterThanOrEqual(90);
    expect(gaugeKPa(1600)).toBeLessThanOrEqual(91);
  });

  it('leaves out a dose of nothing', () => {
    const plain = { ...document, additions: document.additions.filter(({ kind }) => kind !== 'salt') };
    expect(stepOf('salts', plain)).toBeUndefined();
  });

  it('warns where the risk is', () => {
    expect(stepOf('tea-out')?.cautions).toContain('scald');
    expect(stepOf('hops-in')?.cautions).toContain('scald');
    // 30 °C: warm as a bath.
    expect(stepOf('hops-out')?.cautions).not.toContain('scald');
    expect(stepOf('hops-out')?.cautions).toContain('dogs');
    expect(stepOf('acid')?.cautions).toContain('acid');
    expect(stepOf('gas')?.cautions).toEqual(expect.arrayContaining(['pressure', 'co2']));
  });

  it('makes a sheet that a run can start with', () => {
    expect(runSheetSchema.safeParse(compileSheet(document, kit)).success).toBe(true);
  });

  const linesOf = (additions: RecipeDocument['additions'], rest: Partial<RecipeDocument> = {}) =>
    compileSheet(buildDocument({ additions, ...rest }), kit)
      .steps.filter(({ kind }) => ['add', 'catch', 'dose', 'steep', 'remove', 'chill', 'heat'].includes(kind))
      .map(({ id, start, done }) => {
        if (start.by === 'temperature') return `${id} at ${start.tempC}`;
        return done.by === 'timer' ? `${id} ${done.durationS}` : id;
      });

  it('steeps the teas of a blend each for its own time', () => {
    const lines = linesOf([
      buildTea(),
      buildTea({ id: 'oolong', name: 'oolong', out: { at: 'timer', durationS: 300 } }),
      buildTea({ id: 'mint', name: 'mint', in: { at: 'steep', afterS: 240 }, out: { at: 'timer', durationS: 60 } }),
    ]);
    expect(lines).toEqual([
      ...['light-heat', 'heat', 'tea-in', 'steep 180', 'tea-out', 'steep-2 60', 'tea-in-2', 'steep-3 60', 'tea-out-2'],
      'chill',
    ]);
  });

  it('calls each charge by its name where there are several', () => {
    const charges = [
      buildHops({ name: 'Saaz' }),
      buildHops({ id: 'two', name: 'Cascade', in: { at: 'falling', tempC: 50 } }),
      buildHops({ id: 'three', name: 'Hallertau', in: { at: 'falling', tempC: 50 } }),
    ];
    const titled = (additions: RecipeDocument['additions']) =>
      compileSheet(buildDocument({ additions }), kit)
        .steps.filter(({ id }) => /^(hops|tea)-/.test(id))
        .map(({ title }) => title);
    expect(titled(charges)).toEqual(['Saaz in', 'Hops in', 'Hops out']);
    expect(titled([buildTea(), ...charges.slice(0, 1)])).toEqual(['Tea in', 'Tea out', 'Hops in', 'Hops out']);
    const long = charges.map((one) => ({ ...one, name: one.name.padEnd(40, '-') }));
    expect(titled(long)).toEqual(['Hops in', 'Hops in', 'Hops out']);
  });

  it('catches hops in charges, with times and levels of their own', () => {
    const lines = linesOf([
      buildHops({ in: { at: 'falling', tempC: 62 }, out: { at: 'timer', durationS: 600 } }),
      buildHops({ id: 'two', in: { at: 'falling', tempC: 50 } }),
      buildHops({ id: 'three', in: { at: 'falling', tempC: 50 }, out: { at: 'transfer' } }),
    ]);
    expect(lines.slice(2)).toEqual([
      ...['chill', 'hops-in at 62', 'contact 600', 'hops-out', 'hops-in-2 at 50', 'hops-out-2 at 30'],
      'hops-out-3 at 20',
    ]);
  });

  it('holds the temperature until the first thing goes in, and only then turns the heat off', () => {
    const late = buildDocument({ additions: [buildTea({ in: { at: 'steep', afterS: 120 } })] });
    expect(linesOf(late.additions)).toEqual([
      'light-heat',
      'heat',
      'hold 120',
      'tea-in',
      'steep 180',
      'tea-out',
      'chill',
    ]);
    expect(stepOf('tea-in', late)?.acts).toEqual(['heat-off', 'tea-in']);
    expect(stepOf('chill', buildDocument({ additions: [buildHops()] }))?.acts).toContain('heat-off');
  });

  it('never lights the heat for a cold steep, and warns of no scald', () => {
    const cold = compileSheet(buildDocument({ steepC: 8 }), kit);
    expect(cold.steps.flatMap(({ cautions }) => cautions)).not.toContain('scald');
    const lines = linesOf(
      [
        buildTea({ in: { at: 'fill' }, out: { at: 'timer', durationS: 8 * 3600 } }),
        buildHops({ in: { at: 'steep', afterS: 7 * 3600 }, out: { at: 'timer', durationS: 3600 } }),
      ],
      { steepC: 8 },
    );
    expect(lines).toEqual(['tea-cold', 'steep 25200', 'hops-in', 'steep-2 3600', 'tea-out']);
  });

  it('takes out what went in cold, and never before it went in', () => {
    expect(linesOf([buildTea({ in: { at: 'fill' }, out: { at: 'timer', durationS: 300 } })])).toEqual([
      ...['light-heat', 'tea-cold', 'cold-stand 300', 'tea-out', 'heat', 'chill'],
    ]);
    expect(linesOf([buildHops({ in: { at: 'falling', tempC: 40 }, out: { at: 'falling', tempC: 60 } })])).toEqual([
      ...['light-heat', 'heat', 'chill', 'hops-in at 40', 'hops-out'],
    ]);
  });

  it('hangs hops into the keg, and takes them out after their time', () => {
    const keg = buildDocument({
      additions: [buildHops({ in: { at: 'transfer' }, out: { at: 'timer', durationS: 24 * 3600 } })],
    });
    expect(stepOf('keg-in', keg)?.amounts).toEqual([{ name: 'Cascade', massG: 60, bag: 'bag 2' }]);
    expect(stepOf('keg-out', keg)).toMatchObject({
      detail: 'Shut the gas and vent first. Cascade after 24 h.',
      cautions: ['pressure', 'co2', 'dogs'],
    });
  });

  it('makes a sheet of every recipe, or says that no pressure gives its gas', () => {
    const check = (any: RecipeDocument, altitudeM: number) => {
      try {
        const compiled = compileSheet(any, { altitudeM, reachS: 12 });
        expect(runSheetSchema.safeParse(compiled).error).toBeUndefined();
        const ids = compiled.steps.map(({ id }) => id);
        for (const addition of any.additions) {
          expect(compiled.steps.some(({ amounts }) => amounts.some(({ massG }) => massG === addition.massG))).toBe(
            true,
          );
        }
        expect(ids).toEqual(expect.arrayContaining(['check-kit', 'fill', 'ph', 'transfer', 'purge', 'gas']));
        expect(compiled.steps.length - any.steps.own.length).toBe(
          compileSheet({ ...any, steps: { own: [] } }, { altitudeM, reachS: 12 }).steps.length,
        );
      } catch (error) {
        expect(error).toBeInstanceOf(RangeError);
        expect(String(error)).toContain('plan less gas');
      }
    };
    fc.assert(fc.property(recipeDocuments, fc.double({ min: -400, max: 6000, noNaN: true }), check));
    // As long and as many as the schema takes.
    const many = Array.from({ length: 40 }, (_, index) =>
      buildHops({
        ...{ id: `hops-${index}`, name: `${index} ${'x'.repeat(77)}`, in: { at: 'falling', tempC: 90 - index } },
        out: { at: 'timer', durationS: 60 + index },
      }),
    );
    check(buildDocument({ additions: many }), 0);
    check(buildDocument({ additions: many.map((hops) => ({ ...hops, in: { at: 'transfer' } })) }), 0);
    check(
      buildDocument({ additions: many.map((hops) => ({ ...hops, in: { at: 'fill' }, out: { at: 'transfer' } })) }),
      0,
    );
  }, 30_000);
});
