import { deskFigures, figureRows, type FigureRow } from '../desk/index.js';
import type { UnitPreferences } from '../units/index.js';
import type { AccountSoFar } from './account.js';
import type { RunState } from './state.js';

/** A figure as it was planned, and as it happened; `null` where there is none. */
export interface FigurePair {
  id: string;
  label: string;
  isLead: boolean;
  planned: FigureRow | null;
  happened: FigureRow | null;
}

/** Groups that a run without a temperature says nothing of. */
const NEEDS_LINE: readonly FigureRow['group'][] = ['day', 'tea', 'hops'];

/**
 * Every figure of the desk twice: from the planned line, and from the recorded one by the same sums.
 *
 * @param account of the same run.
 * @param units of the person who reads the words.
 */
export function figurePairs({ document, kit }: RunState, account: AccountSoFar, units: UnitPreferences): FigurePair[] {
  if (!document || !kit) return [];
  const desk = deskFigures(document, kit, units);
  const planned = desk.kind === 'figures' ? desk.rows : [];
  const { day, plan, figures, isLineKnown } = account;
  const happened = figureRows({ document: day.document, kit, day, plan, figures, units }).filter(
    ({ group }) => isLineKnown || !NEEDS_LINE.includes(group),
  );
  const own = new Map(happened.map((row) => [row.id, row]));
  const told = new Set(planned.map(({ id }) => id));
  return [
    ...planned.map((row) => ({ ...named(row), planned: row, happened: own.get(row.id) ?? null })),
    ...happened.filter(({ id }) => !told.has(id)).map((row) => ({ ...named(row), planned: null, happened: row })),
  ];
}

function named({ id, label, isLead }: FigureRow): Pick<FigurePair, 'id' | 'label' | 'isLead'> {
  return { id, label, isLead };
}
