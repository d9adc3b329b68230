import type { RowContext } from './figure-row.js';
import type { DeskWarning, WarningGrade } from './types.js';
import { acidWarnings } from './warnings-acid.js';
import { kitWarnings } from './warnings-kit.js';
import { leafWarnings } from './warnings-leaf.js';
import { waterWarnings } from './warnings-water.js';

const order: readonly WarningGrade[] = ['danger', 'care', 'note'];

/** What the brewer should think of, the gravest first. None of it blocks anything. */
export function deskWarnings(context: RowContext): DeskWarning[] {
  return [...acidWarnings(context), ...kitWarnings(context), ...waterWarnings(context), ...leafWarnings(context)].sort(
    (a, b) => order.indexOf(a.grade) - order.indexOf(b.grade),
  );
}
