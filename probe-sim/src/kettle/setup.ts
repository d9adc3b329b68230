import { specificHeatJPerKgK } from '@steepfall/shared/figures';

export interface ProbeSetup {
  /** Time constant in the liquid, s. */
  tauS: number;
  /** How long it does not move at all after a change, s. */
  deadTimeS: number;
  /** Standard deviation of what eddies and the chip add to a reading. */
  noiseC: number;
  /** How long such a deviation lasts: real noise has a memory of seconds. */
  noiseMemoryS: number;
  /** Smallest step that it can show; 0 for none. */
  resolutionC: number;
  samplePeriodS: number;
  /** Reads too high by this much. */
  biasC: number;
}

export interface KettleSetup {
  waterMassKg: number;
  waterTempC: number;
  kettleMassKg: number;
  kettleSpecificHeatJPerKgK: number;
  diameterM: number;
  roomC: number;
  humidityPercent: number;
  /** Pressure of the air at this place (not reduced to sea level); sets the boiling point. */
  pressureKPa: number;
  /** Power that is paid for. */
  heaterPowerW: number;
  /** Share of it that reaches the kettle, 0 to 1. */
  heaterEfficiency: number;
  coolantC: number;
  coolantKgPerS: number;
  /** Heat transfer of the coil in still liquid at 82 °C with coolant at 15 °C; it falls as the liquid cools. */
  coilUAWPerK: number;
  /** The same in stirred liquid, where it hardly depends on temperature. */
  coilStirredUAWPerK: number;
  coilMassKg: number;
  coilSpecificHeatJPerKgK: number;
  /** Water left inside the coil when it goes in, at coolant temperature. */
  coilWaterKg: number;
  teaMassKg: number;
  hopsMassKg: number;
  probe: ProbeSetup;
  /** The same seed gives the same readings. */
  seed: number;
}

export type KettleOverrides = Partial<Omit<KettleSetup, 'probe'>> & { probe?: Partial<ProbeSetup> };

/** A kettle for a 20 L drink on an induction plate, with a stainless coil and a slow waterproof one-wire probe. */
export function defaultKettle(overrides: KettleOverrides = {}): KettleSetup {
  return {
    waterMassKg: 22,
    waterTempC: 18,
    kettleMassKg: 4.5,
    kettleSpecificHeatJPerKgK: specificHeatJPerKgK.stainlessSteel,
    diameterM: 0.36,
    roomC: 21,
    humidityPercent: 50,
    pressureKPa: 101.325,
    heaterPowerW: 3500,
    heaterEfficiency: 0.84,
    coolantC: 12,
    coolantKgPerS: 0.1,
    coilUAWPerK: 296,
    coilStirredUAWPerK: 450,
    coilMassKg: 2.5,
    coilSpecificHeatJPerKgK: specificHeatJPerKgK.stainlessSteel,
    coilWaterKg: 0.35,
    teaMassKg: 0.1,
    hopsMassKg: 0.06,
    seed: 1,
    ...overrides,
    probe: {
      tauS: 6,
      deadTimeS: 1.5,
      noiseC: 0.05,
      noiseMemoryS: 4,
      resolutionC: 0.0625,
      samplePeriodS: 1,
      biasC: 0,
      ...overrides.probe,
    },
  };
}

/** Lowest and highest that is accepted. Beyond these the published laws behind the kettle do not hold. */
const ranges = {
  waterMassKg: [0.1, 2000],
  waterTempC: [0, 100],
  kettleMassKg: [0, 1000],
  kettleSpecificHeatJPerKgK: [100, 5000],
  diameterM: [0.05, 5],
  roomC: [0, 45],
  humidityPercent: [0, 100],
  pressureKPa: [50, 110],
  heaterPowerW: [0, 200_000],
  heaterEfficiency: [0, 1],
  coolantC: [-5, 45],
  coolantKgPerS: [0.001, 10],
  coilUAWPerK: [0.1, 100_000],
  coilStirredUAWPerK: [0.1, 100_000],
  coilMassKg: [0, 200],
  coilSpecificHeatJPerKgK: [100, 5000],
  coilWaterKg: [0, 50],
  teaMassKg: [0, 100],
  hopsMassKg: [0, 100],
  seed: [0, 2 ** 32 - 1],
} as const satisfies Record<keyof Omit<KettleSetup, 'probe'>, readonly [number, number]>;

const probeRanges = {
  tauS: [0, 600],
  deadTimeS: [0, 120],
  noiseC: [0, 5],
  noiseMemoryS: [0, 600],
  resolutionC: [0, 5],
  samplePeriodS: [0.05, 600],
  biasC: [-20, 20],
} as const satisfies Record<keyof ProbeSetup, readonly [number, number]>;

/** @throws RangeError naming the first number that is out of range. */
export function checkKettle(setup: KettleSetup): void {
  const check = (name: string, value: number, [low, high]: readonly [number, number]) => {
    if (value >= low && value <= high) return;
    throw new RangeError(`${name} must be between ${low} and ${high}, got ${value}.`);
  };
  for (const name of Object.keys(ranges) as (keyof typeof ranges)[]) check(name, setup[name], ranges[name]);
  for (const name of Object.keys(probeRanges) as (keyof typeof probeRanges)[]) {
    check(`probe.${name}`, setup.probe[name], probeRanges[name]);
  }
}
