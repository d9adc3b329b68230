import { celsiusToKelvin } from '../../units/index.js';
import { GAS_CONSTANT_J_PER_MOL_K } from '../numeric/constants.js';
import { within } from '../numeric/guard.js';

/** pK from its value, enthalpy (kJ/mol) and heat capacity (J/(mol K)) at 25 °C. */
function fromHeats(pK25: number, enthalpyKj: number, heatCapacityJ: number): (tempC: number) => number {
  const rLn10 = GAS_CONSTANT_J_PER_MOL_K * Math.LN10;
  return (tempC) => {
    const k = celsiusToKelvin(within(tempC, 'A temperature for this acid', 0, 77, '°C'));
    const heat = ((enthalpyKj * 1000) / rLn10) * (1 / k - 1 / 298.15);
    const curve = (heatCapacityJ / rLn10) * (1 - 298.15 / k - Math.log(k / 298.15));
    return pK25 + heat + curve;
  };
}

/** Measured only up to 50 °C; held there above, where the change is below 0.02. */
function upTo50(pK: (tempC: number) => number): (tempC: number) => number {
  return (tempC) => pK(Math.min(50, within(tempC, 'A temperature for this acid', 0, 77, '°C')));
}

/** Negative decadic logarithm of the constant of one step at zero ionic strength, 0 to 77 °C. */
type StepPk = (tempC: number) => number;

/**
 * Dissociation of each acid, step by step.
 * Citric, phosphoric, tartaric, hydrogen sulfate: R. N. Goldberg, N. Kishore, R. M. Lennen, J. Phys. Chem. Ref. Data 31, 231,
 * 2002 (from memory, partly cross-checked). Lactic: Martin and Tartar 1937, as quoted by ECHA. Malic: M. Eden, R. G. Bates,
 * J. Res. NBS 62, 1959, first coefficients refitted. Ascorbic: CRC Handbook (from memory), no temperature term.
 */
const citricPk: readonly StepPk[] = [
  fromHeats(3.128, 4.07, -131),
  fromHeats(4.761, 2.23, -178),
  fromHeats(6.396, -3.38, -254),
];
const phosphoricPk: readonly StepPk[] = [
  fromHeats(2.148, -8, -141),
  fromHeats(7.198, 3.6, -230),
  fromHeats(12.35, 16, -242),
];
const tartaricPk: readonly StepPk[] = [fromHeats(3.036, 3.19, -147), fromHeats(4.366, 0.93, -218)];
const lacticPk: readonly StepPk[] = [upTo50((t) => 3.857 + 5.1e-5 * (t - 22.5) ** 2)];
const malicPk: readonly StepPk[] = [
  upTo50((t) => 1358.5 / celsiusToKelvin(t) - 5.1382 + 0.01355 * celsiusToKelvin(t)),
  upTo50((t) => 1658.7 / celsiusToKelvin(t) - 6.2364 + 0.019353 * celsiusToKelvin(t)),
];
const ascorbicPk: readonly StepPk[] = [upTo50(() => 4.04), upTo50(() => 11.7)];
const carbonicPk: readonly StepPk[] = [
  (t) => -carbonicLog(t, [-356.3094, -0.06091964, 21_834.37, 126.8339, -1_684_915]),
  (t) => -carbonicLog(t, [-107.8871, -0.03252849, 5151.79, 38.92561, -563_713.9]),
];
const hydrogenSulfatePk: readonly StepPk[] = [fromHeats(1.987, -22.4, -258)];

function carbonicLog(tempC: number, [a, b, c, d, e]: readonly [number, number, number, number, number]): number {
  const k = celsiusToKelvin(within(tempC, 'A temperature for carbonic acid', 0, 90, '°C'));
  return a + b * k + c / k + d * Math.log10(k) + e / k ** 2;
}

export const acidPk = {
  citric: citricPk,
  lactic: lacticPk,
  phosphoric: phosphoricPk,
  malic: malicPk,
  tartaric: tartaricPk,
  ascorbic: ascorbicPk,
  carbonic: carbonicPk,
  hydrogenSulfate: hydrogenSulfatePk,
} as const;

export type Dissociating = keyof typeof acidPk;

/**
 * pK of every step of an acid at zero ionic strength.
 *
 * @param tempC 0 to 77 °C (carbonic to 90); lactic, malic and ascorbic are held above 50.
 * @throws RangeError outside that range.
 * @example acidPkAt('citric', 25) // [3.128, 4.761, 6.396]
 */
export function acidPkAt(acid: Dissociating, tempC: number): number[] {
  return acidPk[acid].map((step) => step(tempC));
}

/** log10 of Henry's constant of CO2, mol/(kg atm), 0 to 90 °C (L. N. Plummer and E. Busenberg 1982). @throws RangeError outside. */
export function carbonicLogHenry(tempC: number): number {
  return carbonicLog(tempC, [108.3865, 0.01985076, -6919.53, -40.45154, 669_365]);
}

/**
 * Ion product of water, as pKw.
 *
 * @param tempC 0 to 100 °C.
 * @throws RangeError outside that range.
 * @see USGS phreeqc.dat.
 * @example waterPk(25) // 13.995
 */
export function waterPk(tempC: number): number {
  const k = celsiusToKelvin(within(tempC, 'A water temperature', 0, 100, '°C'));
  return -(293.29227 + 0.1360833 * k - 10_576.913 / k - 123.73158 * Math.log10(k) - 6.996455e-5 * k ** 2);
}
