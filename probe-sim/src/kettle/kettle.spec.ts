import { describe, expect, it } from 'vitest';
import { coilPowerW, lossToRoom } from './heat-flow.js';
import {
  actOnKettle,
  advanceKettle,
  kettleCapacityJPerK,
  startKettle,
  type KettleAct,
  type KettleState,
} from './kettle.js';
import { defaultKettle, type KettleOverrides } from './setup.js';

const still = { noiseC: 0, resolutionC: 0 };
const start = (overrides: KettleOverrides, ...acts: KettleAct[]): KettleState =>
  acts.reduce(actOnKettle, startKettle(defaultKettle({ probe: still, ...overrides })));

/** 9.46 L in a pot 29 cm wide and 15 cm deep of 2 kg of steel: 40.7 kJ/K. */
const referencePot: KettleOverrides = {
  waterMassKg: 9.48,
  kettleMassKg: 2,
  kettleSpecificHeatJPerKgK: 500,
  diameterM: 0.29,
  roomC: 22,
  humidityPercent: 50,
};

function fallCPerMin(state: KettleState): number {
  return state.tempC - advanceKettle(state, 60).tempC;
}

describe('heating', () => {
  it('takes the heat of 10 kg of water and 2.5 kg of steel from 20 to 82 °C: 1485 s of 1800 W, and the loss on top', () => {
    let kettle = start(
      {
        waterMassKg: 10,
        waterTempC: 20,
        kettleMassKg: 2.5,
        kettleSpecificHeatJPerKgK: 500,
        heaterPowerW: 2000,
        heaterEfficiency: 0.9,
        roomC: 20,
      },
      'lid-on',
      'heat-on',
    );
    let lostJ = 0;
    while (kettle.tempC < 82) {
      lostJ += lossToRoom(kettle.setup, kettle).powerW;
      kettle = advanceKettle(kettle, 1);
    }
    expect((kettle.atS * 1800 - lostJ) / 1800).toBeCloseTo(1485, -1);
    // With a loss of 6 W/K it would be 1663 s; this pot, wider and with a lid, loses less.
    expect(kettle.atS).toBeGreaterThan(1485);
    expect(kettle.atS).toBeLessThan(1663);
  });

  it('stops at the boiling point of 95.0 kPa, 98.18 °C (IAPWS SR1-86), and boils 1800 W less the loss away', () => {
    const boiling = { waterTempC: 98, pressureKPa: 95, heaterPowerW: 2000, heaterEfficiency: 0.9 };
    const hot = advanceKettle(start(boiling, 'lid-on', 'heat-on'), 600);
    expect(hot.tempC).toBeCloseTo(98.18, 1);
    const later = advanceKettle(hot, 3600);
    expect(later.tempC).toBe(hot.tempC);
    const lossW = lossToRoom(hot.setup, hot).powerW;
    // 2.07 kg/h at 1300 W (2.264 MJ/kg at 100 °C).
    const expectedKg = ((1800 - lossW) / 1300) * 2.07;
    expect((later.evaporatedKg - hot.evaporatedKg) / expectedKg).toBeCloseTo(1, 1);
  });

  it('does not boil dry', () => {
    const dry = advanceKettle(start({ waterMassKg: 0.2, waterTempC: 99 }, 'heat-on'), 1200);
    expect(dry.waterKg).toBeCloseTo(0.05);
    expect(dry.tempC).toBe(dry.boilingC);
  });
});

describe('standing', () => {
  // Natural convection, Stefan-Boltzmann and Shah 2002; the evaporation law itself is good to 20 %.
  it.each([
    [82, 0.78, 0.14],
    [70, 0.46, 0.1],
    [60, 0.29, 0.08],
    [40, 0.09, 0.03],
  ])('the reference pot at %s °C falls %s K/min open and %s with a lid', (waterTempC, openCPerMin, liddedCPerMin) => {
    const open = start({ ...referencePot, waterTempC });
    expect(fallCPerMin(open) / openCPerMin).toBeGreaterThan(0.9);
    expect(fallCPerMin(open) / openCPerMin).toBeLessThan(1.1);
    const lidded = fallCPerMin(actOnKettle(open, 'lid-on'));
    expect(Math.abs(lidded - liddedCPerMin)).toBeLessThan(0.02);
  });

  it('loses about 16 K and 0.2 kg of water in half an hour open, about 4 K and none with a lid', () => {
    const open = advanceKettle(start({ ...referencePot, waterTempC: 82 }), 1800);
    expect(82 - open.tempC).toBeGreaterThan(13);
    expect(82 - open.tempC).toBeLessThan(19);
    expect(open.evaporatedKg).toBeGreaterThan(0.15);
    expect(open.evaporatedKg).toBeLessThan(0.3);
    const lidded = advanceKettle(start({ ...referencePot, waterTempC: 82 }, 'lid-on'), 1800);
    expect(82 - lidded.tempC).toBeGreaterThan(3.2);
    expect(82 - lidded.tempC).toBeLessThan(4.8);
    expect(lidded.evaporatedKg).toBe(0);
  });

  // Range: by the law used here, and by an independent analogy of heat and mass transfer, which evaporates more.
  it.each([
    ['no coil', {}, [], 4.8, 6.1, 0.9],
    ['a dry copper coil of 2.2 kg', { coilWaterKg: 0 }, ['coil-in'], 5.7, 6.9, 2.1],
    ['the same coil with 0.35 kg of cold water inside', { coilWaterKg: 0.35 }, ['coil-in'], 7.6, 8.5, 4.4],
  ] as const)('with %s falls in six minutes from 85 °C what is known', (_, coil, acts, least, most, lidded) => {
    const pot = {
      ...referencePot,
      waterTempC: 85,
      coilMassKg: 2.2,
      coilSpecificHeatJPerKgK: 385,
      coolantC: 18,
      ...coil,
    };
    const open = advanceKettle(start(pot, ...acts), 360);
    expect(85 - open.tempC).toBeGreaterThan(least * 0.95);
    expect(85 - open.tempC).toBeLessThan(most * 1.05);
    const covered = advanceKettle(start(pot, 'lid-on', ...acts), 360);
    expect(Math.abs(85 - covered.tempC - lidded)).toBeLessThan(0.2);
  });

  it('at 3000 m starts at the boiling point at most, 89.97 °C (U.S. Standard Atmosphere 1976), and falls from there', () => {
    const high = start({ ...referencePot, waterTempC: 95, pressureKPa: 70.109 });
    expect(high.tempC).toBeCloseTo(89.97, 1);
    expect(fallCPerMin(high)).toBeGreaterThan(0.78);
  });

  it('warms up slowly when it is colder than the room', () => {
    const cold = start({ waterTempC: 8, roomC: 22 });
    const later = advanceKettle(cold, 3600).tempC;
    expect(later).toBeGreaterThan(8.1);
    expect(later).toBeLessThan(12);
    expect(advanceKettle(cold, 40_000).tempC).toBeGreaterThan(later);
  });
});

describe('cold things going in', () => {
  const pot = {
    waterMassKg: 9.16,
    waterTempC: 85,
    kettleMassKg: 2,
    kettleSpecificHeatJPerKgK: 500,
    coilMassKg: 2.2,
    coilSpecificHeatJPerKgK: 385,
    roomC: 22,
    coolantC: 18,
  };

  it.each([
    [0, 83.67],
    [0.35, 81.36],
  ])('a copper coil with %s kg of water inside brings 85 °C to %s at once (energy balance)', (coilWaterKg, tempC) => {
    expect(start({ ...pot, coilWaterKg }, 'coil-in').tempC).toBeCloseTo(tempC, 1);
  });

  it('100 g of dry tea in 9 kg costs about 0.3 K', () => {
    const tea = start({ ...pot, teaMassKg: 0.1 }, 'tea-in');
    expect(85 - tea.tempC).toBeGreaterThan(0.2);
    expect(85 - tea.tempC).toBeLessThan(0.35);
  });

  it('poured water mixes in and stays', () => {
    const poured = start({ ...pot, kettleMassKg: 0 }, { act: 'cold-water', massKg: 9.16, tempC: 15 });
    expect(poured.tempC).toBeCloseTo(50, 6);
    expect(poured.waterKg).toBeCloseTo(18.32);
    expect(start(pot, { act: 'cold-water', massKg: 1 }).tempC).toBeLessThan(80);
    expect(() => start(pot, { act: 'cold-water', massKg: -1 })).toThrow(RangeError);
  });

  it('doing a thing twice is doing it once', () => {
    const acts = ['coil-in', 'tea-in', 'hops-in', 'heat-on', 'lid-on', 'chiller-on'] as const;
    for (const act of acts) expect(start(pot, act, act)).toEqual(start(pot, act));
    const out = ['tea-in', 'tea-out', 'tea-out', 'hops-in', 'hops-out', 'hops-out'] as const;
    expect(start(pot, ...out)).toEqual(start(pot, 'tea-in', 'tea-out', 'hops-in', 'hops-out'));
  });

  it('leaf takes liquid away when it comes out, and leaves the temperature', () => {
    const steeped = start(pot, 'tea-in');
    const pulled = actOnKettle(steeped, 'tea-out');
    expect(steeped.waterKg - pulled.waterKg).toBeCloseTo(0.4);
    expect(pulled.tempC).toBe(steeped.tempC);
    expect(actOnKettle(start(pot), 'hops-out').waterKg).toBe(9.16);
  });
});

describe('chilling', () => {
  /** 40 kJ/K, coil of 240 W/K when stirred, 0.1 kg/s at 15 °C: effectiveness 0.4364. */
  const chilled: KettleOverrides = {
    waterMassKg: 40_000 / 4186,
    waterTempC: 82,
    kettleMassKg: 0,
    coilMassKg: 0,
    coilWaterKg: 0,
    coolantC: 15,
    coolantKgPerS: 0.1,
    coilStirredUAWPerK: 240,
    roomC: 22,
    diameterM: 0.25,
  };

  it.each([
    [82, 18.36],
    [60, 12.33],
    [40, 6.85],
  ])(
    'a coil in stirred liquid at %s °C takes %s K/min (effectiveness of an exchanger, one side mixed)',
    (tempC, rate) => {
      const fall = (coilPowerW(defaultKettle(chilled), tempC, true) / 40_000) * 60;
      expect(fall).toBeCloseTo(rate, 1);
    },
  );

  it('brings 82 to 25 °C in 416.5 s, a little sooner for the loss to the room', () => {
    let kettle = start(chilled, 'lid-on', 'chiller-on');
    while (kettle.tempC > 25) {
      if (Math.round(kettle.atS) % 20 === 0) kettle = actOnKettle(kettle, 'stirred');
      kettle = advanceKettle(kettle, 1);
    }
    expect(kettle.atS).toBeGreaterThan(416.5 * 0.97);
    expect(kettle.atS).toBeLessThan(416.5 * 1.005);
  });

  // Churchill and Chu outside, Gnielinski inside, computed for 9.5 mm by 7.6 m.
  it.each([
    [82, 296],
    [60, 241],
    [40, 180],
    [25, 110],
  ])('in still liquid at %s °C the coil transfers about %s W/K', (tempC, transferWPerK) => {
    const still = coilPowerW(defaultKettle({ coilUAWPerK: 296, coolantC: 15 }), tempC, false);
    const constant = coilPowerW(defaultKettle({ coilStirredUAWPerK: transferWPerK, coolantC: 15 }), tempC, true);
    expect(Math.abs(still / constant - 1)).toBeLessThan(0.05);
  });

  it('never cools below the coolant, and faster when stirred', () => {
    const running = start({ waterTempC: 60 }, 'chiller-on');
    expect(advanceKettle(actOnKettle(running, 'stirred'), 20).tempC).toBeLessThan(advanceKettle(running, 20).tempC);
    const long = advanceKettle(running, 40_000);
    expect(long.tempC).toBeGreaterThan(12);
    expect(long.tempC).toBeLessThan(14);
    expect(advanceKettle(actOnKettle(long, 'chiller-off'), 3600).tempC).toBeGreaterThan(long.tempC);
  });

  it('a chiller that runs has its coil in', () => {
    expect(start({}, 'chiller-on').isCoilIn).toBe(true);
    expect(kettleCapacityJPerK(start({}, 'coil-in')) - kettleCapacityJPerK(start({}))).toBeCloseTo(
      2.5 * 500 + 0.35 * 4186,
    );
  });
});

describe('a kettle', () => {
  it('of 20 L has a day of a sensible length', () => {
    const until = (kettle: KettleState, done: (tempC: number) => boolean) => {
      while (!done(kettle.tempC)) kettle = advanceKettle(kettle, 1);
      return kettle;
    };
    const minutes = (from: KettleState, to: KettleState) => (to.atS - from.atS) / 60;
    const begin = start({}, 'lid-on', 'heat-on');
    const hot = until(begin, (tempC) => tempC >= 76);
    expect(minutes(begin, hot)).toBeGreaterThan(25);
    expect(minutes(begin, hot)).toBeLessThan(45);
    const steeped = advanceKettle((['heat-off', 'tea-in'] as const).reduce(actOnKettle, hot), 180);
    const chilling = (['tea-out', 'lid-off', 'chiller-on'] as const).reduce(actOnKettle, steeped);
    const caught = until(chilling, (tempC) => tempC <= 62);
    expect(minutes(chilling, caught)).toBeLessThan(3);
    const cool = until(actOnKettle(caught, 'hops-in'), (tempC) => tempC <= 20);
    expect(minutes(caught, cool)).toBeLessThan(45);
    expect(cool.waterKg).toBeGreaterThan(20);
  });

  it('says what is wrong with a setup', () => {
    expect(() => startKettle(defaultKettle({ roomC: 60 }))).toThrow('roomC must be between 0 and 45, got 60.');
    expect(() => startKettle(defaultKettle({ probe: { tauS: Number.NaN } }))).toThrow('probe.tauS');
    expect(() => advanceKettle(start({}), -1)).toThrow(RangeError);
  });

  it('does not depend on how it is advanced', () => {
    const hot = start({ waterTempC: 70 }, 'chiller-on');
    let small = hot;
    for (let i = 0; i < 240; i += 1) small = advanceKettle(small, 0.25);
    expect(small.tempC).toBeCloseTo(advanceKettle(hot, 60).tempC, 6);
    expect(advanceKettle(hot, 0)).toBe(hot);
  });
});
