import { describe, expect, it } from 'vitest';
import { specificHeatJPerKgK } from './specific-heat.js';

describe('specific heats', () => {
  it.each([
    [20, 4184],
    [60, 4185],
    [82, 4198],
    [95, 4210],
  ])('IAPWS-95: water at %s °C, %s J/(kg K), is the constant within 0.6 %%', (_tempC, heat) => {
    expect(Math.abs(specificHeatJPerKgK.water / heat - 1)).toBeLessThan(0.006);
  });

  it('Engineers Edge and material-properties.org: the metals of kettles (leaf from memory)', () => {
    const { copper, aluminium, mildSteel, brass, stainlessSteel, dryLeaf } = specificHeatJPerKgK;
    expect([copper, aluminium, mildSteel, brass, stainlessSteel]).toEqual([386, 902, 500, 400, 500]);
    expect(dryLeaf).toBeGreaterThanOrEqual(1500);
    expect(dryLeaf).toBeLessThanOrEqual(1700);
  });
});
