import type { Workings } from './types.js';

const extraction =
  'First order: a rate that grows with temperature is summed over the planned curve from leaf in to leaf out.';
const extractionSource =
  'D. Jaganyi and R. D. Price, Food Chem. 64, 27, 1999 (caffeine, 40.3 kJ/mol); S. Farakte et al., Int. J. Food Eng. 2015 (polyphenols); W. E. Price and M. Spiro, J. Sci. Food Agric. 36, 1309, 1985 (leaf size).';
const rateBand = 'A factor of two on the rate. It matters little past 4 minutes at 80 °C, and a lot below 60 °C.';
const curveDefaults = ['chillerConstantPerS', 'roomC', 'lidOn'];
const rateAssumptions = [
  'Leaf wets at once and is not stirred.',
  'Rates at 80 °C: dust 2.0 and 1.3, broken 1.0 and 0.5, whole 0.5 and 0.3 a minute for caffeine and polyphenols.',
];
const caffeineSource =
  'Content: J. Tea Sci. Res. 14, 19, 2024 (white); M. A. Stander et al., J. Food Compos. Anal. 76, 39, 2019 (rooibos); green, oolong, black from memory. Rates: D. Jaganyi and R. D. Price 1999.';
const isoModel =
  'Dissolved alpha acids turn to iso-alpha acids, and those decay, each at a rate that grows with temperature, along the planned curve.';
const isoSource =
  'M. G. Malowicki and T. H. Shellhammer, J. Agric. Food Chem. 53, 4434, 2005; solubility a judgement through 90 mg/L at pH 5.2 and 40 mg/L at pH 5.0.';
const isoBand = 'Solubility a factor of three; below 80 °C the rate is carried on past its measurements, 35 %.';
const isoAssumptions = [
  '20 mg/L of alpha acids dissolve at 60 °C below pH 4.5.',
  'All hops share what the liquid can dissolve.',
  'Alpha acids as typed: those of today.',
];

/** Tea, hops and gas. */
export const drinkWorkings = {
  'tea.caffeine': {
    meaning: 'Caffeine in a litre of the drink, from all teas.',
    model: 'Grams of leaf times its caffeine times the share that is out.',
    source: caffeineSource,
    band: 'Nine times out of ten, drawn 500 times: the content of this kind of leaf, and a factor of two on the rate. A content that you type counts within a tenth.',
    assumptions: [
      ...rateAssumptions,
      'The kind of tea says little about its caffeine: never promise that white is low.',
    ],
    defaults: curveDefaults,
  },
  'tea.caffeine-serving': {
    meaning: 'Caffeine in one serving. Round it to 5 mg when you write it on something.',
    model: 'Caffeine in a litre times the serving.',
    source: caffeineSource,
    band: 'That of the caffeine in a litre.',
    assumptions: ['A serving of 355 mL unless the recipe says otherwise.'],
    defaults: ['servingMl', ...curveDefaults],
  },
  'tea.steep-dose': {
    meaning: 'How far this leaf was steeped, in minutes at 80 °C that do as much.',
    model: 'Each moment counts by its temperature (35 kJ/mol), from leaf in to leaf out.',
    source:
      'Windows: S. Saklar et al., J. Food Sci. Technol. 52, 6639, 2015 (green); S. Pérez-Burillo et al., Food Chem. 248, 111, 2018 (white); C. D. Fernando and P. Soysa, Nutr. J. 14, 74, 2015 (black). Oolong and all amber and red lines are a judgement.',
    band: 'About a tenth from the temperature; the lines themselves are good to 40 %.',
    assumptions: ['Herbs and rooibos have no line, and no line holds for a cold steep: go by taste there.'],
    defaults: curveDefaults,
  },
  'tea.dose': {
    meaning: 'Dry leaf for each litre of water.',
    model: 'Grams over litres.',
    source: 'The recipe. 3 to 8 g/L are usual (common practice, no source).',
    band: 'None.',
    assumptions: [],
    defaults: [],
  },
  'tea.caffeine-turns': {
    meaning: 'How many times over the caffeine could have come out: at 1 two thirds are out, at 3 nearly all.',
    model: extraction,
    source: extractionSource,
    band: rateBand,
    assumptions: rateAssumptions,
    defaults: curveDefaults,
  },
  'tea.caffeine-out': {
    meaning: 'Share of the leaf’s caffeine that is in the drink.',
    model: `${extraction} At most 95 % come out of dust, 93 % of broken, 90 % of whole leaf.`,
    source: extractionSource,
    band: rateBand,
    assumptions: rateAssumptions,
    defaults: curveDefaults,
  },
  'tea.polyphenols': {
    meaning: 'Polyphenols that are out, of those that can come out: body first, astringency later.',
    model: extraction,
    source: extractionSource,
    band: rateBand,
    assumptions: rateAssumptions,
    defaults: curveDefaults,
  },
  'tea.left-in': {
    meaning: 'The steep if nobody takes this leaf out before the keg.',
    model: 'The steep dose over the rest of the planned curve, the chill and all.',
    source: 'As for the steep dose.',
    band: 'About a tenth from the temperature; the lines themselves are good to 40 %.',
    assumptions: [],
    defaults: curveDefaults,
  },
  'tea.left-in-polyphenols': {
    meaning: 'Polyphenols that would be out then.',
    model: extraction,
    source: extractionSource,
    band: rateBand,
    assumptions: rateAssumptions,
    defaults: curveDefaults,
  },
  'hops.bitterness': {
    meaning:
      'How bitter the hops make it, as so many mg/L of iso-alpha acids would. A number of this page, not a laboratory unit.',
    model: 'Iso-alpha acids, plus 0.66 of the humulinones, plus a tenth of the alpha acids that stay dissolved.',
    source:
      'Weights: V. A. Algazzali and T. H. Shellhammer, J. ASBC 74, 36, 2016; alpha from memory. Threshold 7.1 mg/L in a lager: T. Kolpin and T. H. Shellhammer, J. ASBC 67, 200, 2009. The words are a judgement.',
    band: 'Nine times out of ten, drawn 500 times: humulinones 0.2 to 0.5 % of the hops, 0.6 to all of them out, solubility a factor of three.',
    assumptions: [
      'The bitterness of the tea comes on top and is not on this scale.',
      'Measured in beer: with nothing sweet in the drink it reads stronger.',
    ],
    defaults: [...curveDefaults, 'teaBaseRatio', 'hopBaseRatio'],
  },
  'hops.dose': {
    meaning: 'Hops for each litre of water.',
    model: 'Grams over litres.',
    source: 'The recipe. 1 to 4 g/L are usual (common practice, no source).',
    band: 'None.',
    assumptions: [],
    defaults: [],
  },
  'hops.turns': {
    meaning: 'Share of dissolved alpha acids that would turn to iso-alpha acids on this contact.',
    model: 'The rate of the turn, summed over the planned curve from hops in to hops out.',
    source: 'M. G. Malowicki and T. H. Shellhammer, J. Agric. Food Chem. 53, 4434, 2005: measured from 90 to 130 °C.',
    band: 'Carried on below 80 °C: 35 %.',
    assumptions: [],
    defaults: curveDefaults,
  },
  'hops.alpha': {
    meaning: 'All the alpha acids of the hops in a litre. Most never dissolve.',
    model: 'Grams of hops times their alpha acids.',
    source: 'The recipe.',
    band: 'A tenth, from lot and analysis.',
    assumptions: ['Alpha acids as typed: those of today. A storage index raises the humulinones, not this.'],
    defaults: curveDefaults,
  },
  'hops.iso': {
    meaning: 'Iso-alpha acids in the drink: what makes boiled hops bitter. Here there is next to none.',
    model: isoModel,
    source: isoSource,
    band: isoBand,
    assumptions: isoAssumptions,
    defaults: [...curveDefaults, 'teaBaseRatio', 'hopBaseRatio'],
  },
  'hops.iso-all-dissolved': {
    meaning: 'Iso-alpha acids if solubility set no limit: an upper end.',
    model: isoModel,
    source: 'M. G. Malowicki and T. H. Shellhammer, J. Agric. Food Chem. 53, 4434, 2005.',
    band: 'Carried on below 80 °C: 35 %.',
    assumptions: ['All alpha acids are dissolved.'],
    defaults: curveDefaults,
  },
  'hops.iso-at-chill': {
    meaning: 'Iso-alpha acids if the same hops went in when the chiller goes on.',
    model: isoModel,
    source: isoSource,
    band: isoBand,
    assumptions: isoAssumptions,
    defaults: [...curveDefaults, 'teaBaseRatio', 'hopBaseRatio'],
  },
  'hops.iso-held': {
    meaning: 'Iso-alpha acids if the same hops were held for 20 minutes at the hottest of the day.',
    model: isoModel,
    source: isoSource,
    band: isoBand,
    assumptions: isoAssumptions,
    defaults: ['teaBaseRatio', 'hopBaseRatio'],
  },
  'hops.iso-held-acid-later': {
    meaning: 'The same with the acid in after the hops: at a higher pH more alpha acids dissolve.',
    model: isoModel,
    source: isoSource,
    band: isoBand,
    assumptions: isoAssumptions,
    defaults: ['teaBaseRatio', 'hopBaseRatio'],
  },
  'hops.humulinones': {
    meaning:
      'Alpha acids that air has changed: they dissolve in acid water, and make most of the bitterness of this drink.',
    model: 'Grams of hops times 0.35 % times 0.8 that come out; 0.5 % from a storage index of 0.4 up.',
    source:
      'J. P. Maye, MBAA 2015 (content); Brauwelt 2017 (0.9 out in three days cold); 0.8 in a quarter of an hour warm is a judgement.',
    band: 'Content 0.2 to 0.5 % of the hops, 0.6 to all of it out.',
    assumptions: ['The length of the contact is not in it; what steams off makes it stronger.'],
    defaults: curveDefaults,
  },
  'hops.alpha-dissolved': {
    meaning: 'Alpha acids that stay dissolved in the cold drink; the rest is haze and sediment.',
    model: 'What dissolves at the serving temperature and the pH of the drink, if there is as much.',
    source: 'A judgement through 90 mg/L at pH 5.2 (M. G. Malowicki 2004) and 40 mg/L at pH 5.0 in the cold.',
    band: 'A factor of three.',
    assumptions: ['20 mg/L at 60 °C below pH 4.5; 2 % less for each degree colder.'],
    defaults: ['teaBaseRatio', 'hopBaseRatio'],
  },
  'gas.gauge': {
    meaning: 'What to set on the regulator so that the cold drink comes to rest at its gas.',
    model: 'CO₂ in water at that temperature, solved for the pressure, less the air pressure of this house.',
    source: 'R. F. Weiss, Mar. Chem. 2, 203, 1974.',
    band: 'Published solubilities differ by 2 %; 3 % of the absolute pressure. A gauge is off by 2 to 5 % of its full scale (from memory).',
    assumptions: ['The drink is nearly water.', 'The altitude of the house; the weather is not in it.'],
    defaults: [],
  },
  'gas.volumes': {
    meaning: 'Litres of gas, at 0 °C and 1 atmosphere, in a litre of drink.',
    model: 'As the recipe says. Real gas: 22.26 L for each mole.',
    source: 'The recipe.',
    band: 'None.',
    assumptions: [],
    defaults: [],
  },
  'gas.g-per-l': {
    meaning: 'Grams of CO₂ in a litre of drink.',
    model: 'Volumes times 1.977 g.',
    source: 'Messer Group, Properties of carbon dioxide.',
    band: '3 %, as it will come to rest.',
    assumptions: [],
    defaults: [],
  },
  'gas.beer-chart': {
    meaning: 'What a chart made for beer would set, to compare with and not to use: water holds 2 to 6 % more gas.',
    model: 'A fit to that chart at the same gas and temperature.',
    source:
      'A. J. deLange, CO₂ volumes in beer, 2011: a private fit to the ASBC Beer-13 chart (coefficients from memory).',
    band: '3 %.',
    assumptions: ['The chart holds from 0 to 15.6 °C.'],
    defaults: [],
  },
} satisfies Record<string, Workings>;
