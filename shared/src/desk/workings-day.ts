import type { Workings } from './types.js';

const heatAssumptions = [
  'Without a kettle: a lidded steel pot that the water fills to four fifths, 175 W for each litre, of which 77 % reach it.',
  'Water from the tap at 15 °C, a room at 20 °C, unless the recipe says otherwise.',
  'The coil goes in shortly before the steep, full of water at room temperature, and is heated with the rest.',
];
const fallAssumptions = [
  'The constant of the recipe first, then the one learned from a finished run, then one from the length of the coil: 240 W/K for 7.6 m, gently stirred, with 0.1 kg of coolant a second.',
  'Coolant at 15 °C when there is a constant and no chiller. With neither the pot cools by itself.',
  'Leaf and hops go in at room temperature, with 1600 J/(kg K).',
];
const heatDefaults = ['fillC', 'roomC', 'lidOn'];
const fallDefaults = ['chillerConstantPerS', 'roomC', 'lidOn'];

/** The planned day and what it leaves for the keg. */
export const dayWorkings = {
  'day.total': {
    meaning: 'From the first flame to the moment when the drink goes into the keg.',
    model: 'All stages of the planned day, one after the other: heating, coil in, steep, fall, contact times.',
    source: 'Energy balance; Newton’s law for a stirred chiller; cooling laws computed for a pot of 9.5 L.',
    band: 'A judgement, a third either way until kettle and chiller were learned from a run.',
    assumptions: [...heatAssumptions, ...fallAssumptions],
    defaults: ['fillC', 'roomC', 'lidOn', 'chillerConstantPerS'],
  },
  'day.heat': {
    meaning: 'How long the cold water takes to the steep temperature.',
    model:
      'Power times efficiency against the heat of water and metal, less what goes off to the room. Copper 386, aluminium 902, steel 500 J/(kg K).',
    source:
      'Energy balance, solved exactly. Efficiency of hobs: Sweeney et al., ACEEE 2014, and Schott 2015. Metals: Engineers Edge.',
    band: 'The efficiency: a gas hob 0.40 to 0.44, electric 0.74 to 0.80, induction 0.84 to 0.90, a ring outdoors 0.25 to 0.45.',
    assumptions: heatAssumptions,
    defaults: heatDefaults,
  },
  'day.boil': {
    meaning: 'The hottest that water gets in the open where this house stands.',
    model: 'Air pressure from the altitude, then the temperature at which steam has that pressure.',
    source:
      'US Standard Atmosphere 1976; IAPWS SR1-86 (W. Wagner and A. Pruss, J. Phys. Chem. Ref. Data 22, 783, 1993).',
    band: 'Weather moves the pressure by 2 to 3 kPa: 0.8 °C.',
    assumptions: ['The altitude of the house.'],
    defaults: [],
  },
  'day.fall': {
    meaning: 'How long it falls from chiller on until this goes in.',
    model:
      'A stirred pot falls toward the coolant by Newton’s law. A pot on its own falls toward the room: with the lid on by the power 1.25 of the height above it, open by 1.6 to 2.4, for the steam.',
    source: 'Newton’s law of cooling; M. M. Shah, HVAC&R Research 8, 125, 2002 for the steam; exponents computed.',
    band: 'A judgement, a third either way until the chiller was learned from a run.',
    assumptions: fallAssumptions,
    defaults: fallDefaults,
  },
  'day.fall-to-keg': {
    meaning: 'How long it falls from chiller on until the drink goes into the keg.',
    model:
      'As for each catch. Contact times that are still running hold the transfer back, and the fall goes on meanwhile.',
    source: 'Newton’s law of cooling; M. M. Shah, HVAC&R Research 8, 125, 2002 for the steam; exponents computed.',
    band: 'A judgement, a third either way until the chiller was learned from a run.',
    assumptions: fallAssumptions,
    defaults: fallDefaults,
  },
  'day.contact': {
    meaning: 'How long this is in the liquid.',
    model: 'From its in to its out on the planned curve; exact where the clock says it.',
    source: 'The recipe and the planned curve.',
    band: 'None where the clock says it; else that of the fall.',
    assumptions: fallAssumptions,
    defaults: fallDefaults,
  },
  'yield.keg': {
    meaning: 'What reaches the keg, as it would read at 20 °C.',
    model: 'Water filled, less what leaf and hops hold, what steams off and what stays in the kettle.',
    source:
      'Volume balance. Held by leaf: a judgement from spent leaf at 75 to 80 % moisture (from memory). Held by hops: common practice, no source.',
    band: 'Leaf holds 3 to 5.5 mL for each gram, hops 4 to 9, cones 7 to 13.',
    assumptions: ['The dead space of the kettle; none without a kettle.', 'Bags drain and are not squeezed.'],
    defaults: ['lidOn', 'roomC', 'chillerConstantPerS'],
  },
  'yield.leaf': {
    meaning: 'Drink that leaves with the wet leaf.',
    model: '4 mL for each gram of dry leaf.',
    source: 'A judgement from spent leaf at 75 to 80 % moisture (from memory).',
    band: '3 to 5.5 mL for each gram. Squeezing gives a third back, and tannin with it.',
    assumptions: ['The bag drains and is not squeezed.', 'Peel, spice and flowers in the kettle hold as much as leaf.'],
    defaults: [],
  },
  'yield.hops': {
    meaning: 'Drink that leaves with the wet hops.',
    model: '7 mL for each gram of pellets, 10 of cones.',
    source: 'Common practice, no source.',
    band: 'Pellets: 4 mL from a drained bag to 9 mL left to settle. Cones: 7 to 13 mL, a judgement.',
    assumptions: ['The bag drains and is not squeezed.'],
    defaults: [],
  },
  'yield.evaporated': {
    meaning: 'Water that goes off as steam while the pot stands open.',
    model: 'Steam from a still surface into still air, summed over the planned curve while the lid is off.',
    source: 'M. M. Shah, HVAC&R Research 8(1), 125, 2002; constants from memory.',
    band: 'A factor of two: draughts double it.',
    assumptions: ['The lid is off from chiller on to the keg, else on.', 'A room at 50 % humidity.'],
    defaults: ['lidOn', 'roomC', 'chillerConstantPerS'],
  },
  'yield.dead-space': {
    meaning: 'What stays under the tap or the siphon.',
    model: 'As written down for the kettle.',
    source: 'The kettle of this house.',
    band: 'None: it was measured once.',
    assumptions: ['None without a kettle, or where it was not written down.'],
    defaults: [],
  },
} satisfies Record<string, Workings>;
