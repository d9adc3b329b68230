/** U+2212: as wide as the digits, and never broken off at the end of a line like a hyphen. */
export const MINUS = '\u2212';
/** U+00A0: a number never parts from its unit. */
export const NO_BREAK_SPACE = '\u00a0';
/** Shown when there is no number to show. */
export const NO_VALUE = '\u2013';

/** Fixed decimals with a true minus, and no minus before a rounded zero. */
export function fixed(value: number, decimals: number): string {
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? `${MINUS}${text}` : text;
}

/** Up to so many decimals; zeros at the end are dropped. */
export function upTo(value: number, decimals: number): string {
  const text = fixed(value, decimals);
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}
