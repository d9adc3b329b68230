import { useState } from 'react';
import type { Revision } from '@steepfall/shared/contracts';
import { revisionDifferences } from '@steepfall/shared/desk';
import { format } from 'date-fns';
import { Button, ButtonLink } from '#components/button.tsx';
import { SelectField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { useUnits } from '#lib/units.ts';
import { DifferenceList } from './difference-list.tsx';
import { SmallLabel } from './number-field.tsx';

interface HistoryProps {
  recipeId: string;
  /** Newest first. */
  revisions: readonly Revision[];
  shownId: string;
  onShow: (revisionId: string) => void;
  mayEdit: boolean;
}

/** Who changed what, when, and why; any two can be held against each other. */
export function History({ recipeId, revisions, shownId, onShow, mayEdit }: HistoryProps) {
  return (
    <section aria-labelledby="history" className="grid min-w-0 gap-6">
      <LevelRule id="history" aside={revisions.length === 1 ? 'one revision' : `${revisions.length} revisions`}>
        History
      </LevelRule>
      {revisions.length > 1 ? <Between revisions={revisions} /> : null}
      <ol className="grid">
        {revisions.map(({ id, number, note, createdBy, createdAtMs }, index) => (
          <li key={id} className="grid grid-cols-[3rem_1fr] gap-x-3 border-b border-hair py-4 last:border-b-0">
            <span className="text-title tabular-nums">{number}</span>
            <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
              <div className="min-w-52 flex-1">
                <p className="text-body font-medium break-words">{note || 'No note.'}</p>
                <p className="text-note text-soft">
                  {createdBy}, {format(createdAtMs, 'd MMMM yyyy, HH:mm')}
                </p>
              </div>
              <div className="flex flex-wrap gap-2">
                {id === shownId ? (
                  <span className="inline-flex min-h-12 items-center px-3 text-body text-soft">shown above</span>
                ) : (
                  <Button look="quiet" onClick={() => onShow(id)}>
                    Show<span className="sr-only"> revision {number}</span>
                  </Button>
                )}
                {mayEdit && index > 0 ? (
                  <ButtonLink to={`/recipes/${recipeId}/edit?from=${id}`}>
                    Go back to this one<span className="sr-only">, revision {number}</span>
                  </ButtonLink>
                ) : null}
              </div>
            </div>
          </li>
        ))}
      </ol>
    </section>
  );
}

function Between({ revisions }: { revisions: readonly Revision[] }) {
  const units = useUnits();
  const [fromId, setFromId] = useState(revisions[1]?.id ?? '');
  const [toId, setToId] = useState(revisions[0]?.id ?? '');
  const from = revisions.find(({ id }) => id === fromId);
  const to = revisions.find(({ id }) => id === toId);
  const differences = from && to ? revisionDifferences(from.document, to.document, units) : [];
  const options = revisions.map(({ id, number, createdAtMs }) => (
    <option key={id} value={id}>
      {number}, {format(createdAtMs, 'd MMM yyyy')}
    </option>
  ));
  return (
    <div className="grid max-w-3xl gap-4">
      <div className="grid max-w-lg grid-cols-2 gap-3">
        <SelectField
          label={<SmallLabel>From revision</SmallLabel>}
          value={fromId}
          onChange={({ target }) => setFromId(target.value)}
        >
          {options}
        </SelectField>
        <SelectField
          label={<SmallLabel>to revision</SmallLabel>}
          value={toId}
          onChange={({ target }) => setToId(target.value)}
        >
          {options}
        </SelectField>
      </div>
      <div role="status">
        {differences.length > 0 ? (
          <DifferenceList differences={differences} />
        ) : (
          <p className="text-body text-soft">Nothing is different between these two.</p>
        )}
      </div>
    </div>
  );
}
