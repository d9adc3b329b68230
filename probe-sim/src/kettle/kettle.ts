import { boilingPointC, latentHeatJPerKg, mixedTempC, specificHeatJPerKgK } from '@steepfall/shared/figures';
import type { VesselAct } from '@steepfall/shared/sheets';
import { coilPowerW, lossToRoom } from './heat-flow.js';
import { followLiquid, shownC, startProbe, wander, type ProbeState } from './probe.js';
import { checkKettle, type KettleSetup } from './setup.js';

/** Plain data: a copy of it is a kettle of its own. */
export interface KettleState {
  readonly setup: KettleSetup;
  readonly boilingC: number;
  /** Since the start. */
  readonly atS: number;
  /** Of the liquid and all that is in it. */
  readonly tempC: number;
  readonly waterKg: number;
  /** Left as steam since the start. */
  readonly evaporatedKg: number;
  readonly isHeatOn: boolean;
  readonly isLidOn: boolean;
  readonly isCoilIn: boolean;
  readonly isChillerOn: boolean;
  readonly isTeaIn: boolean;
  readonly isHopsIn: boolean;
  readonly stirredUntilS: number;
  readonly probe: ProbeState;
}

/** What can be done to the kettle. Cold water is poured in at coolant temperature unless told. */
export type KettleAct = VesselAct | { act: 'cold-water'; massKg: number; tempC?: number };

const LONGEST_STEP_S = 0.25;
/** The liquid keeps turning for a while after a stir. */
const STIR_LASTS_S = 30;
/** Liquid that drained leaf and drained hops carry away, kg per kg dry (common practice). */
const TEA_KEEPS = 4;
const HOPS_KEEP = 7;
/** A kettle is never simulated dry. */
const LEAST_WATER_KG = 0.05;

const { water: WATER_J_PER_KG_K, dryLeaf: LEAF_J_PER_KG_K } = specificHeatJPerKgK;

/** @throws RangeError when a number of the setup is out of range. */
export function startKettle(setup: KettleSetup): KettleState {
  checkKettle(setup);
  const boilingC = boilingPointC(setup.pressureKPa);
  const tempC = Math.min(setup.waterTempC, boilingC);
  return {
    setup,
    boilingC,
    atS: 0,
    tempC,
    waterKg: setup.waterMassKg,
    evaporatedKg: 0,
    isHeatOn: false,
    isLidOn: false,
    isCoilIn: false,
    isChillerOn: false,
    isTeaIn: false,
    isHopsIn: false,
    stirredUntilS: 0,
    probe: startProbe(setup.probe, tempC, setup.seed),
  };
}

/** The kettle right after something was done to it. Doing it again changes nothing, except stirring and pouring. */
export function actOnKettle(state: KettleState, act: KettleAct): KettleState {
  if (typeof act === 'object') return addWater(state, act.massKg, act.tempC ?? state.setup.coolantC);
  switch (act) {
    case 'heat-on':
      return { ...state, isHeatOn: true };
    case 'heat-off':
      return { ...state, isHeatOn: false };
    case 'lid-on':
      return { ...state, isLidOn: true };
    case 'lid-off':
      return { ...state, isLidOn: false };
    case 'coil-in':
      return putCoilIn(state);
    case 'chiller-on':
      // Water runs through the coil: a coil that nobody noted must be in by now.
      return { ...putCoilIn(state), isChillerOn: true };
    case 'chiller-off':
      return { ...state, isChillerOn: false };
    case 'tea-in':
      return state.isTeaIn ? state : { ...mixIn(state, leafPart(state.setup.teaMassKg, state)), isTeaIn: true };
    case 'tea-out':
      return state.isTeaIn ? { ...drain(state, TEA_KEEPS * state.setup.teaMassKg), isTeaIn: false } : state;
    case 'hops-in':
      return state.isHopsIn ? state : { ...mixIn(state, leafPart(state.setup.hopsMassKg, state)), isHopsIn: true };
    case 'hops-out':
      return state.isHopsIn ? { ...drain(state, HOPS_KEEP * state.setup.hopsMassKg), isHopsIn: false } : state;
    case 'stirred':
      return { ...state, stirredUntilS: state.atS + STIR_LASTS_S };
  }
}

/** The kettle `elapsedS` later with nothing done to it. */
export function advanceKettle(state: KettleState, elapsedS: number): KettleState {
  if (!(elapsedS >= 0)) throw new RangeError(`A kettle only goes forward in time, got ${elapsedS} s.`);
  if (elapsedS === 0) return state;
  const steps = Math.ceil(elapsedS / LONGEST_STEP_S);
  const stepS = elapsedS / steps;
  let next = state;
  for (let i = 0; i < steps; i += 1) next = step(next, stepS);
  return { ...next, probe: wander(state.setup.probe, next.probe, elapsedS) };
}

/** What the probe shows, through its lag, noise, bias and resolution. */
export function readProbe(state: KettleState): number {
  return shownC(state.setup.probe, state.probe);
}

/** Heat that warms everything in the kettle, and the kettle, by one kelvin, J/K. */
export function kettleCapacityJPerK(state: KettleState): number {
  const { setup } = state;
  const coil = setup.coilMassKg * setup.coilSpecificHeatJPerKgK + setup.coilWaterKg * WATER_J_PER_KG_K;
  return (
    state.waterKg * WATER_J_PER_KG_K +
    setup.kettleMassKg * setup.kettleSpecificHeatJPerKgK +
    (state.isCoilIn ? coil : 0) +
    (state.isTeaIn ? setup.teaMassKg * LEAF_J_PER_KG_K : 0) +
    (state.isHopsIn ? setup.hopsMassKg * LEAF_J_PER_KG_K : 0)
  );
}

function step(state: KettleState, stepS: number): KettleState {
  const { setup } = state;
  const atS = state.atS + stepS;
  const loss = lossToRoom(setup, state);
  const heaterW = state.isHeatOn ? setup.heaterPowerW * setup.heaterEfficiency : 0;
  const coilW = state.isChillerOn ? coilPowerW(setup, state.tempC, state.atS < state.stirredUntilS) : 0;
  const capacity = kettleCapacityJPerK(state);
  const wouldBeC = state.tempC + ((heaterW - loss.powerW - coilW) * stepS) / capacity;
  // At the boiling point heat makes steam, not temperature. Ice is not simulated.
  const tempC = Math.max(0, Math.min(state.boilingC, wouldBeC));
  const boiledKg =
    Math.max(0, wouldBeC - state.boilingC) * (capacity / latentHeatJPerKg(Math.min(100, state.boilingC)));
  const steamKg = Math.min(loss.evaporationKgPerS * stepS + boiledKg, Math.max(0, state.waterKg - LEAST_WATER_KG));
  return {
    ...state,
    atS,
    tempC,
    waterKg: state.waterKg - steamKg,
    evaporatedKg: state.evaporatedKg + steamKg,
    probe: followLiquid(setup.probe, state.probe, tempC, atS, stepS),
  };
}

interface ColdPart {
  massKg: number;
  specificHeatJPerKgK: number;
  tempC: number;
}

function leafPart(massKg: number, { setup }: KettleState): ColdPart {
  return { massKg, specificHeatJPerKgK: LEAF_J_PER_KG_K, tempC: setup.roomC };
}

/** Everything comes to one temperature at once: a step, not a slope. */
function mixIn(state: KettleState, ...parts: ColdPart[]): KettleState {
  const grams = parts.map(({ massKg, ...part }) => ({ ...part, massG: massKg * 1000 }));
  const now = { massG: 1000, specificHeatJPerKgK: kettleCapacityJPerK(state), tempC: state.tempC };
  const tempC = Math.min(state.boilingC, Math.max(0, mixedTempC([now, ...grams])));
  return { ...state, tempC };
}

function putCoilIn(state: KettleState): KettleState {
  if (state.isCoilIn) return state;
  const { setup } = state;
  const metal = { massKg: setup.coilMassKg, specificHeatJPerKgK: setup.coilSpecificHeatJPerKgK, tempC: setup.roomC };
  const inside = { massKg: setup.coilWaterKg, specificHeatJPerKgK: WATER_J_PER_KG_K, tempC: setup.coolantC };
  return { ...mixIn(state, metal, inside), isCoilIn: true };
}

function addWater(state: KettleState, massKg: number, tempC: number): KettleState {
  if (!(massKg >= 0)) throw new RangeError(`Water poured in must be 0 kg or more, got ${massKg}.`);
  const poured = { massKg, specificHeatJPerKgK: WATER_J_PER_KG_K, tempC };
  return { ...mixIn(state, poured), waterKg: state.waterKg + massKg };
}

function drain(state: KettleState, massKg: number): KettleState {
  return { ...state, waterKg: Math.max(LEAST_WATER_KG, state.waterKg - massKg) };
}
