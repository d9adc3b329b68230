import { durationMsFromText } from '../text/duration-text.js';
import { fault, faultKinds, type Fault, type FaultKind } from './fault.js';

const SHAPE = /^([a-z-]+)@([^+=]+)(?:\+([^=]+))?(?:=(.+))?$/;

/**
 * Reads `kind@from[+duration][=amount]`: `dropout@120s+20s`, `open-wire@5m`, `spike@3m30s=6`.
 *
 * @throws RangeError that says what is wrong and what would be right.
 */
export function faultFromText(text: string): Fault {
  const [, kind, from, duration, amount] = SHAPE.exec(text.trim()) ?? [];
  if (!kind || !from) {
    throw new RangeError(`"${text}" is no fault. Write kind@from[+duration][=amount], such as dropout@120s+20s.`);
  }
  if (!isFaultKind(kind)) throw new RangeError(`There is no fault "${kind}". Known: ${faultKinds.join(', ')}.`);
  const value = amount === undefined ? undefined : Number(amount);
  if (Number.isNaN(value)) throw new RangeError(`"${amount}" in "${text}" is no number.`);
  return fault(kind, durationMsFromText(from), {
    ...(duration === undefined ? {} : { durationMs: durationMsFromText(duration) }),
    ...(value === undefined ? {} : { amount: value }),
  });
}

function isFaultKind(text: string): text is FaultKind {
  return (faultKinds as readonly string[]).includes(text);
}
