import { describe, expect, it } from 'vitest';
import * as figures from './index.js';

const steep = [
  { atMs: 0, tempC: 82 },
  { atMs: 240_000, tempC: 60 },
];
const water = { ca: 20, mg: 4, na: 12, k: 1, cl: 18, so4: 22, hco3: 51 };
const salts = [{ salt: 'gypsum', massG: 2, assayPercent: 98 }];
const drink = { water, acidsMolPerL: { citric: 0.002 }, leafBaseMeqPerL: 2, co2MolPerL: 0.1, tempC: 25 };
const solution = {
  acidsMolPerL: { citric: 0.002 },
  strongIonEqPerL: 0.001,
  sulfateMolPerL: 0.001,
  strongIonicStrength: 0.004,
  gasCo2MolPerL: 0.00001,
  sites: [{ molPerL: 0.001, pK: 4 }],
  citrateMetals: { calciumMolPerL: 0.002, magnesiumMolPerL: 0.001 },
  tempC: 25,
};
const inLiquid = { inAtMs: 0, outAtMs: 240_000, baseMultiplier: 1 };
const plan = {
  waterL: 20,
  source: water,
  salts,
  acids: [{ acid: 'lactic', massG: 7, strengthPercent: 80 }],
  teas: [{ kind: 'white', form: 'whole', massG: 80, ...inLiquid }],
  hops: [{ massG: 40, alphaPercent: 9, storageIndex: 0.3, ...inLiquid }],
  curve: steep,
  evaporatedL: 0.1,
  deadSpaceL: 0.2,
  servingMl: 355,
  gas: { volumes: 3, tempC: 4, stationKPa: 98 },
};
const heating = {
  heatCapacityJPerK: 43_110,
  fromC: 20,
  toC: 82,
  powerW: 2000,
  efficiency: 0.9,
  lossWPerK: 6,
  roomC: 20,
};
const stages = [
  { id: 'heat', kind: 'heat', ...heating, fromC: undefined },
  { id: 'coil', kind: 'mix', toC: 80 },
  { id: 'steep', kind: 'hold', durationS: 240 },
  { id: 'rest', kind: 'fall', referenceC: 20, fallCPerS: 0.01, exponent: 2.1, durationS: 120 },
  { id: 'chill', kind: 'cool', surroundC: 15, kPerS: 0.0013, toC: 30 },
];
const chiller = { transferWPerK: 240, coolantKgPerS: 0.1, coolantInC: 15, heatCapacityJPerK: 40_000 };
const room = { roomC: 22, humidityRatio: 0.5, stationKPa: 100 };
const falling = { fromC: 83, referenceC: 22, fallCPerS: 0.0135, exponent: 1.4 };
const keg = { startGPerL: 1, restGPerL: 5, uptakePerH: 0.02 };
const line = { gaugeKPa: 86, riseM: 0.5, boreMm: 4.76, fittings: 2.5, lineFactor: 1.1, densityKgPerM3: 1000 };
const lift = { reachCm: 25, heightCm: 75, travelCm: 25, twistDeg: 0, frequencyFactor: 1, grip: 'good' };
const leak = { leakKgPerH: 0.5, roomM3: 25, airChangesPerH: 0.5, outdoorPpm: 420 };
const baths = { boilC: 98, iceK: 0.1, boilK: 0.2 };

/** Every figure that takes numbers, with a call that is in order. */
const calls: Partial<Record<keyof typeof figures, readonly unknown[]>> = {
  absoluteFromGaugeKPa: [80, 101],
  abvFromFermentedSugar: [5],
  acidDose: [drink, 3, 'lactic', 80],
  acidMassG: ['lactic', 0.002, 20, 80],
  acidMolPerL: [{ acid: 'lactic', massG: 7, strengthPercent: 80 }, 20],
  acidPkAt: ['citric', 25],
  agitatedDurationS: [keg, 4],
  agitatedGPerL: [keg, 3600],
  airWaterRatioAt: [0.86, 60],
  alkalinityAsCaCo3: [100],
  alkalinityMeqPerL: [{ hco3: 51 }],
  allowedGaugeKPa: [900],
  alphaLossPercent: [0.31, 110],
  alphaNowPercent: [{ harvestPercent: 9, ageDays: 100 }],
  alphaSolubilityMgPerL: [60, 3.7, 20],
  atmosphericPressureKPa: [1500],
  bestBeforePrecision: [2],
  bitternessWord: [6],
  blendedWater: [
    [
      { water, volumeL: 5 },
      { water, volumeL: 15 },
    ],
  ],
  boilOffKgPerH: [{ usefulPowerW: 1800, sensibleLossW: 500, boilingC: 100 }],
  boilingPointAtAltitudeC: [1500],
  boilingPointC: [95],
  caffeineMgPerL: [61, 6],
  carbonicLogHenry: [25],
  chargeBalance: [water],
  chargeGaugeKPa: [{ volumes: 2.5, tempC: 4, stationKPa: 98 }],
  checkedCurve: [steep],
  checkedIons: [water],
  childCaffeineMgPerDay: [20],
  chillerConstantPerS: [{ ...chiller, coolantInC: undefined }],
  chillerFallCPerS: [chiller, 60],
  chlorideSulfate: [{ cl: 18, so4: 22 }, [{ salt: 'gypsum', massG: 2 }]],
  citricInJuiceG: [100, 'freshLime'],
  co2Band: [5000],
  co2Budget: [{ gPerL: 5, drinkL: 18, headspaceL: 1, tempC: 3, absoluteKPa: 181 }],
  co2DiffusionM2PerS: [10],
  co2FromFermentedSugarGPerL: [5],
  co2GPerL: [4, 200],
  co2GPerLFromVolumes: [2.7],
  co2GasG: [{ volumeL: 18, tempC: 3, absoluteKPa: 181 }],
  co2HenryMolPerKgAtm: [10],
  co2M3PerKg: [20, 101_325],
  co2MaxKg: [5000, 25],
  co2MinutesTo: [5000, leak],
  co2MolPerKg: [4, 200],
  co2MolPerLFromVolumes: [2.7],
  co2MoleFractionHot: [60, 100],
  co2PpmMixed: [2, 25],
  co2PpmSimple: [2, 25],
  co2SaturationKPa: [20],
  co2SteadyPpm: [leak],
  co2VapourDensityKgPerM3: [20],
  co2VirialCm3PerMol: [20],
  co2Volumes: [5],
  coilEffectiveness: [240, 0.1],
  coilTransferWPerK: [{ outerMm: 9.5, lengthM: 7.6, stirred: false, tempC: 60 }],
  compareWithBeerChart: [4, 190],
  complexedDrinkPh: [drink],
  concentrationFactor: [20, 1],
  conductivityUsPerCm: [water],
  contrastUnderLight: [{ whiteCdPerM2: 400, blackCdPerM2: 0.4, lux: 500, reflectance: 0.05 }],
  coolantOutC: [{ ...chiller, heatCapacityJPerK: undefined }, 60],
  coolingRule: [steep, { uncertaintyK: 0.5 }],
  correctedTempC: [82, { slope: 1.008, offsetC: -0.4 }],
  correctionUncertaintyK: [82, baths],
  counterflowEffectiveness: [1.5, 0.8],
  counterflowOutC: [{ hotInC: 80, coolantInC: 15, effectiveness: 0.8, smallerOverHotFlow: 1 }],
  crossingLateS: [10, 0.0025],
  cssPxForMm: [20, 264, 2],
  curveFromReadings: [steep],
  cylinderLeftG: [{ scaleG: 5200, tareG: 3500, regulatorG: 700 }],
  cylinderVolumeL: [2268, 0.68],
  daviesActivity: [1, 0.01, 0.51],
  debyeHuckelA: [25],
  dissolvedIonsMgPerL: [water],
  drinkFigures: [plan],
  drinkPh: [drink],
  drinkPhBand: [drink],
  drinkYieldL: [{ startL: 20, leafG: 100, hopsG: 60, evaporatedL: 0.05, deadSpaceL: 1 }],
  electrodeCheck: [{ ph1: 4.01, mv1: 177, ph2: 7, mv2: 0, tempC: 25 }],
  equilibriumAbsoluteKPa: [5, 4],
  euCaffeineStatementNeeded: [{ caffeineMgPerL: 180, teaOrCoffeeBased: true, nameSaysTeaOrCoffee: true }],
  evaporatedL: [steep, { openM2: 0.07, roomC: 20, humidityRatio: 0.5 }],
  evaporationInto: [room],
  evaporationKgPerM2H: [{ waterC: 70, ...room }],
  extendedDebyeHuckelActivity: [1, 0.001, 4],
  extractionTurns: [steep, 1, 40],
  flatToleranceK: ['typeTClass1', 82],
  gaugeFromAbsoluteKPa: [181, 101],
  hardnessAsCaCo3: [{ ca: 20, mg: 4 }],
  hazeFlags: [
    {
      caMgPerL: 110,
      hardnessAsCaCo3MgPerL: 274,
      teas: [{ kind: 'white', doseGPerL: 5 }],
      hops: true,
      chilledCold: true,
    },
  ],
  hco3FromCaCo3: [100],
  headspaceRatio: [0.86, 20, 5],
  heatCapacityJPerK: [[{ massG: 10_000, material: 'water' }]],
  heatingTime: [heating],
  hopBitternessIndex: [{ isoMgPerL: 0.1, humulinoneMgPerL: 8.4, huluponeMgPerL: 0, alphaDissolvedMgPerL: 6 }],
  hopContactTime: [steep],
  humulinoneMgPerL: [{ doseGPerL: 3, contentPercent: 0.35, extractedRatio: 0.8 }],
  humulinonePercent: [0.35],
  iceMassG: [10_000, 60, 10],
  ionMeqPerL: [{ ca: 20 }, 'ca'],
  ionicStrengthFromConductivity: [606],
  ionicStrengthMolPerL: [water],
  isoLossPerMin: [60],
  isomerisationPerMin: [60],
  isomerisationTurns: [steep],
  isomerise: [steep, { alphaMgPerL: 270, ph: 3.8, solubilityAt60MgPerL: 20 }],
  juiceMl: [7, 'freshLemon'],
  kegMassKg: [{ volumeL: 18.93, tareKg: 4.3, densityKgPerL: 1 }],
  labBitternessUnits: [0.5],
  lateHops: [steep, steep, 60],
  latentHeatJPerKg: [80],
  leafBase: [2],
  leafBaseExtractedRatio: [4],
  leafExtraction: [steep, 'whole', { rateFactor: 1, wettingLagS: 20 }],
  leafSizeRateFactor: [550, 925],
  learnedHeaterEfficiency: [{ heatCapacityJPerK: 43_110, rateCPerS: 0.04, powerW: 2000, lossW: 100 }],
  leastCoolingConstant: [3],
  lethalityMin: [steep, { referenceC: 80, zK: 10 }],
  letterHeightMm: [500, 20],
  liftingIndex: [20, lift],
  lineDrop: [59, 4.76, { densityKgPerM3: 1000, viscosityPaS: 0.0016 }],
  lineFlowMlPerS: [line, 3],
  lineLengthM: [line, 30],
  liquidGoneBelowG: [2268, 20, 0.68],
  lotMultiplier: [drink, 3.5],
  massBalance: [{ producedL: 40, onHandL: 18.5, deliveredL: 19, samplesL: 0.6, lossesL: 1.5 }],
  meanAcidCharge: ['citric', 3.5, 25],
  mixedTempC: [
    [
      { massG: 9000, specificHeatJPerKgK: 4186, tempC: 85 },
      { massG: 2000, specificHeatJPerKgK: 385, tempC: 22 },
    ],
  ],
  mmForCssPx: [44, 264, 2],
  molarMassRateRatio: [458, 290],
  nernstSlopeMv: [25],
  newtonConstantPerS: [85, 77, 22, 600],
  newtonDurationS: [85, 77, 22, 0.0002],
  newtonTempC: [85, 22, 0.0002, 600],
  oneWireToleranceK: [82],
  oxygenPercentMixed: [2, 25],
  pasteurisationUnits: [steep],
  phBand: [4.1, 0.05],
  phMethod: [4.1],
  phthalatePh: [25],
  planCurve: [20, stages],
  platinumToleranceK: ['B', 82],
  potLossW: [{ tempC: 82, roomC: 22, humidityRatio: 0.5, diameterM: 0.29, depthM: 0.15, lid: false }],
  powerLawDurationS: [falling, 77],
  powerLawTempC: [falling, 300],
  probeLag: [5, 10],
  purgedAirRatio: [301, 101, 3],
  recommendedLiftKg: [lift],
  salinity: [water],
  saltedWater: [20, salts, water],
  sanitiserContactS: [{ kind: 'chlorine', mgPerL: 100, ph: 9, tempC: 20 }],
  scaldSeconds: [60],
  scaledCoolingConstantPerS: [0.0002, 10, 80],
  scaledMassG: [40, 20, 12.4, 1],
  servingCaffeineMg: [139, 355],
  servingsToLimit: [200, 330, 400],
  solvePh: [solution],
  stationPressureKPa: [101, 500],
  steepDoseMin: [steep],
  steepLinesHold: [steep],
  steepVerdict: ['white', 4],
  steepedCaffeineMgPerL: [{ doseGPerL: 5, contentMgPerG: 35, extractedRatio: 0.8 }],
  stillDurationS: [keg, 4],
  stillGPerL: [keg, 3600],
  stillUptakePerH: [{ tempC: 3, restGPerL: 5, depthM: 0.55 }],
  sugarForAbvGPerL: [0.5],
  tcsClass: [{ ph: 3.9, waterActivity: 0.99, table: 'not-sealed' }],
  technicalBufferPh: ['seven', 25],
  titratableAcidityGPerL: [{ ...drink, co2MolPerL: undefined, tempC: undefined }, 8.2],
  titratedAcidityGPerL: [{ baseMl: 6, normality: 0.1, sampleMl: 50 }],
  tooAcidForCopper: [5],
  tubeVolumeL: [7.6, 7.9],
  twoPointCorrection: [0.4, 97.9, 98.3],
  undissolvedSalts: [20, salts],
  volumeAtTemperatureL: [20, 82, 20],
  volumeForStockL: [20, [{ name: 'tea', massG: 55, stockG: 34 }]],
  warmKegGaugeKPa: [{ drinkL: 18, headspaceL: 1, volumes: 2.7, closedAtC: 3, stationKPa: 98 }, 20],
  waterDensityKgPerM3: [82],
  waterFromReport: [
    {
      caMgPerL: 80,
      mgMgPerL: 10,
      naMgPerL: 20,
      kMgPerL: 1,
      clMgPerL: 40,
      so4MgPerL: 50,
      alkalinity: { as: 'hco3', mgPerL: 122 },
    },
  ],
  waterPk: [25],
  waterVapourPressureKPa: [82],
  waterViscosityPaS: [4],
};

/** No numbers of the trade: words, days, bands of any size; or parts, whose whole is checked here. */
const others = new Set<string>([
  'acidFigures',
  'addBands',
  'amountAtPh',
  'band',
  'caffeineContent',
  'chargeAt',
  'contrastRatio',
  'curveBetween',
  'curveIntegralMin',
  'curveTempC',
  'discardDate',
  'divideBands',
  'drinkSolution',
  'greatestStrength',
  'hopFigures',
  'mapBand',
  'monteCarlo',
  'multiplyBands',
  'phAtStrength',
  'plusMinus',
  'prepared',
  'saltAlkalinityMeqPerG',
  'saltIonMgPerG',
  'seededDraw',
  'settledStrength',
  'showBand',
  'showPhBand',
  'solvePrepared',
  'subtractBands',
  'sure',
  'teaFigures',
  'weakest',
  'withinFactor',
]);

type Path = readonly (string | number)[];

function numbersIn(value: unknown, path: Path = []): Path[] {
  if (typeof value === 'number') return [path];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, [...path, key]));
}

function put(value: unknown, [key, ...rest]: Path, bad: number): unknown {
  if (key === undefined) return bad;
  const copy = structuredClone(value) as Record<string | number, unknown>;
  copy[key] = put(copy[key], rest, bad);
  return Array.isArray(value) ? Object.values(copy) : copy;
}

/** Instants may be as large as a clock; all else that is out of any range is refused. */
const badFor = (path: Path) =>
  /Ms$/.test(String(path.at(-1))) ? [Number.NaN, Infinity] : [Number.NaN, Infinity, -1e9, 1e9];

describe('every figure', () => {
  it('is listed here', () => {
    const named = Object.entries(figures).flatMap(([name, value]) => (typeof value === 'function' ? [name] : []));
    expect(named.filter((name) => !Object.hasOwn(calls, name) && !others.has(name))).toEqual([]);
  });

  it.each(Object.entries(calls))('%s refuses what cannot be, with what to do', (name, args) => {
    const call = (list: readonly unknown[]) =>
      (figures[name as keyof typeof figures] as (...list: unknown[]) => unknown)(...list);
    expect(() => call(args)).not.toThrow();
    const passed = numbersIn(args).flatMap((path) =>
      badFor(path).flatMap((bad) => {
        try {
          return [
            `${path.join('.')} = ${bad} gave ${JSON.stringify(call(put(args, path, bad) as unknown[]))?.slice(0, 60)}`,
          ];
        } catch (problem) {
          const says = problem instanceof RangeError && /(must|cannot) .*\. [A-Z][a-z]+ /.test(problem.message);
          return says ? [] : [`${path.join('.')} = ${bad} threw ${String(problem)}`];
        }
      }),
    );
    expect(passed).toEqual([]);
  });
});
