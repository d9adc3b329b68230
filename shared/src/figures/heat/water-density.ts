import { within } from '../numeric/guard.js';

/**
 * Density of air-free water at 1 atm in kg/m³ (the same number as g/L). Tea and hop tea are water here.
 *
 * @param tempC 0 to 150 °C; above the boiling point it stands for water kept liquid by pressure.
 * @throws RangeError outside that range.
 * @see G. S. Kell, J. Chem. Eng. Data 20(1), 97-105, 1975; the quadratic term is negative.
 * @example waterDensityKgPerM3(82) // 970.54
 */
export function waterDensityKgPerM3(tempC: number): number {
  const t = within(tempC, 'A water temperature', 0, 150, '°C');
  const series =
    999.83952 + t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 + t * -280.54253e-12))));
  return series / (1 + 16.87985e-3 * t);
}
