/** One bar in kPa, exact (SI Brochure). */
export const KPA_PER_BAR = 100;
/**
 * One pound-force per square inch in kPa, exact up to the last digit of a double: 0.45359237 kg times 9.80665 m/s² over
 * (0.0254 m)², in kPa (NIST SP 811, B.8).
 */
export const KPA_PER_PSI = (0.45359237 * 9.80665) / 0.0254 ** 2 / 1000;
/** One standard atmosphere in kPa, exact (10th CGPM, 1954). */
export const KPA_PER_ATM = 101.325;

/** Pressure, kPa to bar. Absolute stays absolute and gauge stays gauge. */
export function kpaToBar(pressureKPa: number): number {
  return pressureKPa / KPA_PER_BAR;
}

/** Pressure, bar to kPa. */
export function barToKpa(pressureBar: number): number {
  return pressureBar * KPA_PER_BAR;
}

/** Pressure, kPa to psi. Absolute stays absolute and gauge stays gauge. `kpaToPsi(72.7)` is 10.5. */
export function kpaToPsi(pressureKPa: number): number {
  return pressureKPa / KPA_PER_PSI;
}

/** Pressure, psi to kPa. `psiToKpa(1)` is 6.894757. */
export function psiToKpa(pressurePsi: number): number {
  return pressurePsi * KPA_PER_PSI;
}
