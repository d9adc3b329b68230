import { z } from 'zod';
import { heaterEfficiency, type HeatSource } from '../figures/index.js';

const heatSources = Object.keys(heaterEfficiency) as [HeatSource, ...HeatSource[]];
const coolingConstantPerS = z
  .number('Type a number.')
  .positive('A constant above 0.')
  .max(0.05, 'No kettle cools that fast: at most 0.05 a second.');

const above0 = (what: string, most: number, unit: string) =>
  z.number('Type a number.').positive(`${what} above 0 ${unit}.`).max(most, `At most ${most} ${unit}.`);
const from0 = (what: string, most: number, unit: string) =>
  z.number('Type a number.').min(0, `${what} of 0 ${unit} or more.`).max(most, `At most ${most} ${unit}.`);

/** A vessel on the heat. What is optional was not asked before: the desk then takes the usual. */
export const kettleFactsSchema = z.strictObject({
  volumeL: above0('A volume', 1000, 'L'),
  diameterM: above0('A width', 3, 'm'),
  massKg: above0('A mass', 500, 'kg'),
  heaterPowerW: above0('A power', 100_000, 'W'),
  heaterEfficiency: z
    .number('Type a number.')
    .min(0.1, 'A share of 0.1 or more.')
    .max(1, 'A share of 1 at most: more than all of it cannot reach the water.'),
  heatSource: z.enum(heatSources).optional(),
  metal: z.enum(['stainless', 'aluminium', 'copper', 'enamelled-steel']).optional(),
  hasLid: z.boolean().optional(),
  /** Stays under the tap or the siphon. */
  deadSpaceL: from0('A dead space', 100, 'L').optional(),
  /** With the lid on, toward the room, learned from a finished run. */
  coolingConstantPerS: coolingConstantPerS.optional(),
});
export type KettleFacts = z.infer<typeof kettleFactsSchema>;

export const chillerFactsSchema = z.strictObject({
  metal: z.enum(['copper', 'stainless']),
  lengthM: above0('A length', 100, 'm'),
  coolantC: z.number('Type a number.').min(-5, 'From -5 °C up.').max(40, 'At most 40 °C.'),
  /** In this house's usual kettle, stirred, toward the coolant; learned from a finished run. */
  coolingConstantPerS: coolingConstantPerS.optional(),
});
export type ChillerFacts = z.infer<typeof chillerFactsSchema>;

export const kegFactsSchema = z.strictObject({
  volumeL: above0('A volume', 200, 'L'),
  tareG: above0('A mass', 100_000, 'g'),
  /** The pressure stamped on the vessel, gauge. */
  ratedKPa: above0('A pressure', 2000, 'kPa'),
});
export type KegFacts = z.infer<typeof kegFactsSchema>;

export const scaleFactsSchema = z.strictObject({
  /** What it shows: the smallest step. */
  resolutionG: above0('A step', 100, 'g'),
  capacityG: above0('A capacity', 500_000, 'g'),
});
export type ScaleFacts = z.infer<typeof scaleFactsSchema>;
