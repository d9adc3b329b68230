import { entryOf, notNegative } from '../numeric/guard.js';

/** Citric acid in juice, g/L, with its spread (K. L. Penniston et al., J. Endourol. 22, 567, 2008). */
export const juiceCitricGPerL = {
  freshLemon: { low: 44.2, value: 48, high: 51.8 },
  freshLime: { low: 39, value: 45.9, high: 52.8 },
  bottledLemon: { low: 34, value: 36.5, high: 39 },
  bottledLime: { low: 35, value: 35, high: 35 },
} as const;

export type Juice = keyof typeof juiceCitricGPerL;

/**
 * Juice that brings as much citric acid, mL; within 15 %.
 *
 * @param citricG anhydrous citric acid, 0 g or more.
 * @throws RangeError when negative or not finite.
 * @see Penniston 2008.
 * @example juiceMl(7, 'freshLemon') // 146
 */
export function juiceMl(citricG: number, juice: Juice): number {
  return (
    (1000 * notNegative(citricG, 'A mass of citric acid', 'g')) / entryOf(juiceCitricGPerL, juice, 'A juice').value
  );
}

/** Anhydrous citric acid in so much juice, g. @throws RangeError when negative or not finite. */
export function citricInJuiceG(volumeMl: number, juice: Juice): number {
  return (notNegative(volumeMl, 'A volume of juice', 'mL') * entryOf(juiceCitricGPerL, juice, 'A juice').value) / 1000;
}
