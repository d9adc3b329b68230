import type { Workings } from './types.js';

const saltBand =
  'Salts as labelled and the scale: 1 %. Calcium chloride that took up water, or is another hydrate, moves it by a quarter or more.';
const saltAssumptions = [
  'Every salt dissolves, also where a warning says that it will not.',
  'Water named as reverse-osmosis water holds what its report says; real water from a membrane holds 5 to 20 mg/L (from memory).',
];
const stoichiometry = 'Stoichiometry with the atomic weights of IUPAC 2021 (from memory).';
const solver =
  'Every charge is counted and must cancel: acids by their constants at 25 °C, leaf and hops as a base, salts, with activities.';
const solverSource =
  'R. N. Goldberg, N. Kishore, R. M. Lennen, J. Phys. Chem. Ref. Data 31, 231, 2002; L. N. Plummer and E. Busenberg 1982 for CO₂; C. W. Davies 1962.';
const leafBand =
  'The base of leaf and hops, 0.6 to 1.7 times. Once it was learned from a measured pH: a tenth of pH either way.';
const leafAssumptions = [
  'Tea brings 0.22 meq of base for each gram, as far as the steep brings it out; hops bring 0.64.',
  'Complexes of calcium with citric acid are left out here and shown on a line of their own: at 110 mg/L of calcium the pH is 0.02 to 0.06 lower with them.',
  'All CO₂ that acid makes of bicarbonate leaves the open pot.',
];
/** The leaf's base comes out along the planned curve. */
const curveDefaults = ['chillerConstantPerS', 'roomC', 'lidOn'];
const leafDefaults = ['teaBaseRatio', 'hopBaseRatio', ...curveDefaults];
const ashSource =
  'Alkalinity of tea ash: ISO 3720 and ISO 11287. Hops: how they move the pH of beer (Brauwelt). A judgement with a factor of two.';

/** Treated water, acid and pH. */
export const waterAcidWorkings = {
  'water.ions': {
    meaning: 'What is dissolved in the treated water, before the heat.',
    model: 'The waters in their shares, plus what each gram of salt sets free.',
    source: stoichiometry,
    band: saltBand,
    assumptions: saltAssumptions,
    defaults: [],
  },
  'water.cl-so4-ions': {
    meaning: 'Milligrams of chloride for each milligram of sulfate in the water: more is rounder, less is drier.',
    model: 'One ion over the other, source water and all. It is not the ratio of the grams you weigh.',
    source: stoichiometry,
    band: saltBand,
    assumptions: ['How it tastes is common practice, no source.'],
    defaults: [],
  },
  'water.cl-so4-salts': {
    meaning: 'Grams of chloride salts for each gram of sulfate salts, as weighed: the other ratio that people quote.',
    model: 'Masses of the salts. For calcium chloride dihydrate and gypsum the ratio of the ions is 0.864 of it.',
    source: stoichiometry,
    band: saltBand,
    assumptions: ['The source water is not in it.'],
    defaults: [],
  },
  'water.hardness': {
    meaning: 'Calcium and magnesium together, as if all were calcium carbonate.',
    model: '2.497 times calcium plus 4.118 times magnesium, mg/L.',
    source: stoichiometry,
    band: saltBand,
    assumptions: saltAssumptions,
    defaults: [],
  },
  'water.alkalinity': {
    meaning: 'Acid that the water itself takes up before its pH falls.',
    model: 'All its bicarbonate; a report that gives it as CaCO₃ is converted.',
    source: stoichiometry,
    band: saltBand,
    assumptions: ['Hydroxide counts as the bicarbonate that it turns into.'],
    defaults: [],
  },
  'water.cations': {
    meaning: 'Plus charges of calcium, magnesium, sodium and potassium.',
    model: 'Each ion over its mass for one charge, summed.',
    source: stoichiometry,
    band: 'None: it is arithmetic on what was typed.',
    assumptions: [],
    defaults: [],
  },
  'water.anions': {
    meaning: 'Minus charges of chloride, sulfate and bicarbonate. In water they equal the plus charges.',
    model:
      'Each ion over its mass for one charge, summed. Above 5 % apart the report is doubtful, above 20 % no pH is worked out.',
    source: stoichiometry,
    band: 'None: it is arithmetic on what was typed.',
    assumptions: [],
    defaults: [],
  },
  'water.ionic-strength': {
    meaning: 'How much all the charges in the water get in each other’s way.',
    model: 'Half the sum of concentration times charge squared.',
    source: 'G. N. Lewis and M. Randall 1921 (definition).',
    band: saltBand,
    assumptions: saltAssumptions,
    defaults: [],
  },
  'water.conductivity': {
    meaning: 'What a conductivity meter would show for water and salts alone: a check on the scale.',
    model: 'Each ion’s own conductivity, less what their crowding takes away.',
    source: 'F. Kohlrausch; values of the CRC Handbook (from memory).',
    band: '5 %. A TDS pen shows this times 0.5 to 0.7; for calcium water 0.47 would be right.',
    assumptions: ['Before the acid goes in.'],
    defaults: [],
  },
  'acid.ph-still': {
    meaning: 'The pH of the finished drink with its gas gone, at 25 °C. Lines of food codes are judged on this one.',
    model: solver,
    source: solverSource,
    band: leafBand,
    assumptions: leafAssumptions,
    defaults: leafDefaults,
  },
  'acid.ph-after-acid': {
    meaning: 'The pH of water, salts and acid before any leaf: what the sheet asks you to measure.',
    model: solver,
    source: solverSource,
    band: '0.03, from constants and activities. With calcium complexes it would be 0.01 to 0.02 lower.',
    assumptions: [
      'Acid that goes into the cold water; what goes in later is not in it yet.',
      'At 25 °C: cool the sample.',
    ],
    defaults: [],
  },
  'acid.ph-still-complexed': {
    meaning:
      'The pH of the finished drink when calcium and magnesium hold part of the citric acid: where the middle lies in hard water.',
    model: `${solver} Three complexes of each metal with citrate are counted too.`,
    source: 'USGS minteq.v4 for the complexes; R. N. Goldberg et al. 2002; C. W. Davies 1962.',
    band: leafBand,
    assumptions: ['Doses and the base ratio are worked out without them; a measured pH takes the difference in.'],
    defaults: leafDefaults,
  },
  'acid.ph-after-acid-complexed': {
    meaning: 'The pH of water, salts and acid when calcium and magnesium hold part of the citric acid.',
    model: `${solver} Three complexes of each metal with citrate are counted too.`,
    source: 'USGS minteq.v4 for the complexes; R. N. Goldberg et al. 2002; C. W. Davies 1962.',
    band: '0.03, from constants and activities.',
    assumptions: ['Acid that goes into the cold water; what goes in later is not in it yet.'],
    defaults: [],
  },
  'acid.dose': {
    meaning: 'All the acid, as it comes from the jar, for each litre of water.',
    model: 'Grams over litres.',
    source: 'The recipe.',
    band: 'None.',
    assumptions: [],
    defaults: [],
  },
  'acid.amount': {
    meaning: 'How many acid molecules are in a litre.',
    model: 'Grams times strength over the molar mass. Citric monohydrate is 9 % weaker per gram than anhydrous.',
    source: stoichiometry,
    band: 'The scale and the label: 1 %.',
    assumptions: ['100 % strength unless the line says otherwise; lactic acid is sold at 80 to 88 %.'],
    defaults: [],
  },
  'acid.lemon-juice': {
    meaning: 'Fresh lemon juice that holds as much citric acid as the whole recipe.',
    model: '48.0 g of citric acid in a litre of juice.',
    source: 'K. L. Penniston et al., J. Endourol. 22, 567, 2008.',
    band: 'One standard deviation from lemon to lemon: 44 to 52 g/L.',
    assumptions: ['Only the citric acid counts.'],
    defaults: [],
  },
  'acid.tea-base': {
    meaning: 'Base that the tea brings: potassium with weak acids, which uses up part of the acid.',
    model: '0.22 meq for each gram, times how far this steep brings it out.',
    source: ashSource,
    band: '0.6 to 1.7 times. Herbs and rooibos: up to a factor of three.',
    assumptions: ['A steep of 4 minutes at 82 °C brings out 0.85 of it.'],
    defaults: ['teaBaseRatio', ...curveDefaults],
  },
  'acid.ph-after-tea': {
    meaning: 'The pH once the tea is out and before the hops.',
    model: solver,
    source: solverSource,
    band: leafBand,
    assumptions: leafAssumptions,
    defaults: ['teaBaseRatio', ...curveDefaults],
  },
  'acid.hop-base': {
    meaning: 'Base that the hops bring: more for each gram than tea.',
    model: '0.64 meq for each gram: 0.8 in the leaf matter, 0.8 of that out while warm.',
    source: ashSource,
    band: '0.6 to 1.7 times.',
    assumptions: ['The time and heat of the contact are not in it.'],
    defaults: ['hopBaseRatio'],
  },
  'acid.ph-carbonated': {
    meaning: 'The pH with the gas in. It tastes sharper; when the gas goes, so does the difference.',
    model: `${solver} CO₂ counts as one acid more.`,
    source: solverSource,
    band: leafBand,
    assumptions: [...leafAssumptions, 'Never judge a line of a food code on it.'],
    defaults: leafDefaults,
  },
  'acid.ph-served': {
    meaning: 'The pH with the gas in, as cold as it is served.',
    model: `${solver} CO₂ counts as one acid more; constants at that temperature.`,
    source: solverSource,
    band: leafBand,
    assumptions: [...leafAssumptions, 'Never judge a line of a food code on it.'],
    defaults: leafDefaults,
  },
  'acid.buffer': {
    meaning: 'How steady the pH is: base from leaf and hops that would raise it by one more.',
    model: 'The pH is worked out with a little more and a little less of that base.',
    source: solverSource,
    band: leafBand,
    assumptions: leafAssumptions,
    defaults: leafDefaults,
  },
  'acid.titratable': {
    meaning: 'What a titration of the flat drink to pH 8.2 would find. Sourness follows it more than the pH.',
    model: 'Strong base is added in the sum until the pH is 8.2, and counted as anhydrous citric acid.',
    source: `${solverSource} End point from memory.`,
    band: 'About 15 %: phenols of tea and phosphate are left out, so the true value is a little higher.',
    assumptions: leafAssumptions,
    defaults: leafDefaults,
  },
  'acid.for-ph': {
    meaning: 'Grams of this acid in all that would bring the finished drink to that pH; other acids stay.',
    model: `${solver} Solved for the acid.`,
    source: solverSource,
    band: 'The base of leaf and hops, 0.6 to 1.7 times. Without them it takes 6 to 12 times less, which is why a dose for water is too small.',
    assumptions: leafAssumptions,
    defaults: leafDefaults,
  },
  'acid.base-ratio': {
    meaning:
      'What a measured pH tells of this lot of leaf and hops: put the number in as the base ratio, and the next plan is good to a tenth.',
    model: `${solver} Solved for the base.`,
    source: solverSource,
    band: 'The meter: a tenth of it.',
    assumptions: ['Measured still and degassed, at 20 to 25 °C.', 'Tea and hops share one ratio.'],
    defaults: leafDefaults,
  },
} satisfies Record<string, Workings>;
