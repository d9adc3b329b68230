import { useDeferredValue, useMemo, useState } from 'react';
import { deskFigures, type DeskKit, type DeskResult } from '@steepfall/shared/desk';
import { recipeDocumentSchema, type RecipeDocument } from '@steepfall/shared/sheets';
import type { UnitPreferences } from '@steepfall/shared/units';
import { figureText } from '#lib/figure-words.ts';

export type Figures = Extract<DeskResult, { kind: 'figures' }>;
export type Impossible = Extract<DeskResult, { kind: 'impossible' }>;

export interface Desk {
  /** The last sums that could be done; null before the first. */
  figures: Figures | null;
  /** The document that they belong to. */
  document: RecipeDocument | null;
  /** True while a field holds nonsense, or the sum cannot be done: what is shown is as of before. */
  isOld: boolean;
  impossible: Impossible | null;
  /** Figures whose text the last change moved, by id. */
  moved: ReadonlySet<string>;
}

/** The figures of a document that is being typed: each key press is taken, and never waited for. */
export function useDesk(typed: RecipeDocument, kit: DeskKit | null, units: UnitPreferences): Desk {
  const deferred = useDeferredValue(typed);
  const now = useMemo(() => {
    if (!kit) return null;
    const parsed = recipeDocumentSchema.safeParse(deferred);
    return parsed.success ? { document: parsed.data, result: deskFigures(parsed.data, kit, units) } : null;
  }, [deferred, kit, units]);

  const [shown, setShown] = useState<{ now: typeof now; desk: Desk }>({ now: null, desk: firstDesk });
  if (now === shown.now) return shown.desk;
  const desk = nextDesk(shown.desk, now, units);
  setShown({ now, desk });
  return desk;
}

const nothing: ReadonlySet<string> = new Set();
const firstDesk: Desk = { figures: null, document: null, isOld: true, impossible: null, moved: nothing };

function nextDesk(
  before: Desk,
  now: { document: RecipeDocument; result: DeskResult } | null,
  units: UnitPreferences,
): Desk {
  if (now?.result.kind !== 'figures') {
    return { ...before, isOld: true, impossible: now?.result.kind === 'impossible' ? now.result : null };
  }
  const { document, result } = now;
  return {
    figures: result,
    document,
    isOld: false,
    impossible: null,
    moved: before.figures ? movedBetween(before.figures, result, units) : nothing,
  };
}

function movedBetween(before: Figures, after: Figures, units: UnitPreferences): ReadonlySet<string> {
  const texts = new Map(before.rows.map((row) => [row.id, figureText(row, units).whole]));
  return new Set(after.rows.filter((row) => texts.get(row.id) !== figureText(row, units).whole).map(({ id }) => id));
}
