import { describe, expect, it } from 'vitest';
import { buildDocument } from '../testing/index.js';
import { compileSheet } from './compile.js';
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
    expect(stepOf('hops-out')?.cautions).toContain('dogs');
    expect(stepOf('acid')?.cautions).toContain('acid');
    expect(stepOf('gas')?.cautions).toEqual(expect.arrayContaining(['pressure', 'co2']));
  });

  it('makes a sheet that a run can start with', () => {
    expect(runSheetSchema.safeParse(compileSheet(document, kit)).success).toBe(true);
  });
});
