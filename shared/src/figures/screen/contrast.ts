import { notNegative, positive, within } from '../numeric/guard.js';

function luminance(hex: string): number {
  const parts = /^#([\da-f]{2})([\da-f]{2})([\da-f]{2})$/i.exec(hex);
  if (!parts) throw new RangeError(`A colour must be written like #ffcc00, got ${hex}. Give six hex digits.`);
  const linear = [parts[1], parts[2], parts[3]].map((pair) => {
    const c = parseInt(pair ?? '', 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * (linear[0] ?? 0) + 0.7152 * (linear[1] ?? 0) + 0.0722 * (linear[2] ?? 0);
}

/**
 * Contrast of two colours, 1 to 21. Text needs 4.5, large text and controls 3; 7 for what is read at arm's length.
 *
 * @throws RangeError when a colour is not #rrggbb.
 * @see WCAG 2.2, contrast ratio.
 * @example contrastRatio('#ffcc00', '#000000') // 13.9
 */
export function contrastRatio(one: string, other: string): number {
  const [high, low] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

/**
 * Contrast that is left when light falls on the glass.
 *
 * @param screen luminances cd/m², of which white above 0; light 0 or more, lux; diffuse reflectance 0 to 1.
 * @throws RangeError outside these ranges.
 * @see diffuse reflection: E rho / pi added to both.
 */
export function contrastUnderLight(screen: {
  whiteCdPerM2: number;
  blackCdPerM2: number;
  lux: number;
  reflectance: number;
}): number {
  const glare = (notNegative(screen.lux, 'Light', 'lux') * within(screen.reflectance, 'A reflectance', 0, 1)) / Math.PI;
  const dark = notNegative(screen.blackCdPerM2, 'A black', 'cd/m²') + glare;
  return (
    (positive(screen.whiteCdPerM2, 'A white', 'cd/m²') + glare) / positive(dark, 'A black with its glare', 'cd/m²')
  );
}
