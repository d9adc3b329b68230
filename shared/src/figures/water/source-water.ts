import { notNegative } from '../numeric/guard.js';
import { hco3FromCaCo3 } from './alkalinity.js';
import type { IonsMgPerL } from './ions.js';

/** A water report as typed in: alkalinity in one of its two forms; potassium may be missing, alkalinity may not. */
export interface WaterReport {
  caMgPerL: number;
  mgMgPerL: number;
  naMgPerL: number;
  kMgPerL?: number;
  clMgPerL: number;
  so4MgPerL: number;
  alkalinity: { as: 'hco3'; mgPerL: number } | { as: 'caco3'; mgPerL: number };
}

/**
 * Ions of a water report, mg/L. The pH of the water is of no use here; its alkalinity is.
 *
 * @throws RangeError when a number is negative or missing.
 */
export function waterFromReport(report: WaterReport): IonsMgPerL {
  const alkalinity = notNegative(report.alkalinity.mgPerL, 'The alkalinity of the report', 'mg/L');
  return {
    ca: notNegative(report.caMgPerL, 'The calcium of the report', 'mg/L'),
    mg: notNegative(report.mgMgPerL, 'The magnesium of the report', 'mg/L'),
    na: notNegative(report.naMgPerL, 'The sodium of the report', 'mg/L'),
    k: notNegative(report.kMgPerL ?? 0, 'The potassium of the report', 'mg/L'),
    cl: notNegative(report.clMgPerL, 'The chloride of the report', 'mg/L'),
    so4: notNegative(report.so4MgPerL, 'The sulfate of the report', 'mg/L'),
    hco3: report.alkalinity.as === 'hco3' ? alkalinity : hco3FromCaCo3(alkalinity),
  };
}
