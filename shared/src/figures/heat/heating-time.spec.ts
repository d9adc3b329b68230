import { describe, expect, it } from 'vitest';
import { heatCapacityJPerK } from './heat-capacity.js';
import { heatingTime } from './heating-time.js';

const heating = {
  heatCapacityJPerK: heatCapacityJPerK([
    { massG: 10_000, material: 'water' },
    { massG: 2500, material: 'stainlessSteel' },
  ]),
  fromC: 20,
  toC: 82,
  powerW: 2000,
  efficiency: 0.9,
};

describe('heatingTime', () => {
  it('energy balance, computed: 1485 s without loss', () => {
    expect(heatingTime(heating)).toEqual({ kind: 'reaches', durationS: expect.closeTo(1485, 0) as number });
  });

  it('energy balance, computed: 1663 s with 6 W/K to a room of 20 °C', () => {
    const answer = heatingTime({ ...heating, lossWPerK: 6, roomC: 20 });
    expect(answer).toEqual({ kind: 'reaches', durationS: expect.closeTo(1663, -0.3) as number });
  });

  it('says that it never gets there, and where it stops', () => {
    expect(heatingTime({ ...heating, powerW: 300, lossWPerK: 6, roomC: 20 })).toEqual({ kind: 'never', limitC: 65 });
    expect(heatingTime({ ...heating, powerW: 0 })).toEqual({ kind: 'never', limitC: 20 });
  });

  it('takes no time when it is there already', () => {
    expect(heatingTime({ ...heating, fromC: 82 })).toEqual({ kind: 'reaches', durationS: 0 });
  });

  it('refuses what makes no sense', () => {
    expect(() => heatingTime({ ...heating, efficiency: 1.2 })).toThrow(RangeError);
    expect(() => heatingTime({ ...heating, powerW: Number.NaN })).toThrow(RangeError);
    expect(() => heatingTime({ ...heating, lossWPerK: 6 })).toThrow(/room temperature/);
  });
});
