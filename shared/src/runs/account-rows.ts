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

/** Groups that a run without a temperature says nothing of; of the acid it knows the water. */
const NEEDS_LINE: readonly FigureRow['group'][] = ['day', 'tea', 'hops', 'acid'];
const OF_WATER = 'acid.ph-after-acid';
/** Rows are made from some curve; what follows from this one is left out. */
const NO_CURVE = [{ atMs: 0, tempC: 20 }];

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
  const { figures, isLineKnown } = account;
  const { document: weighed } = account.day;
  const day = isLineKnown ? account.day : { ...account.day, curve: NO_CURVE };
  const plan = isLineKnown ? account.plan : { ...account.plan, curve: NO_CURVE };
  const happened = figureRows({ document: weighed, kit, day, plan, figures, units }).filter(
    ({ id, group }) => isLineKnown || id === OF_WATER || !NEEDS_LINE.includes(group),
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
