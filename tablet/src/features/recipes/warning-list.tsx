import type { DeskWarning, WarningGrade } from '@steepfall/shared/desk';
import { classNames } from '#components/class-names.ts';
import { ShapeGlyph, type Shape } from '#components/shapes.tsx';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import type { Impossible } from './use-desk.ts';

const dress: Record<WarningGrade, { shape: Shape; word: string }> = {
  danger: { shape: 'diamond', word: 'Danger' },
  care: { shape: 'ring', word: 'Take care' },
  note: { shape: 'dash', word: 'Good to know' },
};
const order: readonly WarningGrade[] = ['danger', 'care', 'note'];

interface WarningListProps {
  warnings: readonly DeskWarning[];
  impossible?: Impossible | null;
  /** Goes to the field of a path; without it nothing leads anywhere. */
  onGo?: (path: string) => void;
}

/** What is the matter, why, and what to do; each leads to its field. */
export function WarningList({ warnings, impossible = null, onGo }: WarningListProps) {
  const units = useUnits();
  const sorted = warnings.toSorted((a, b) => order.indexOf(a.grade) - order.indexOf(b.grade));
  if (sorted.length === 0 && !impossible) {
    return <p className="text-body text-soft">Nothing stands against this recipe in what the desk can see.</p>;
  }
  return (
    <ul className="grid gap-5">
      {impossible ? (
        <li role="alert">
          <Item
            grade="danger"
            word="Cannot be worked out"
            what={inPersonsWords(impossible.what, units)}
            go={goTo(impossible.path, onGo)}
          >
            {inPersonsWords(impossible.act, units)}
          </Item>
        </li>
      ) : null}
      {sorted.map((warning) => (
        <li key={warning.id}>
          <Item
            grade={warning.grade}
            word={dress[warning.grade].word}
            what={inPersonsWords(warning.what, units)}
            go={goTo(warning.path, onGo)}
          >
            {inPersonsWords(warning.why, units)}{' '}
            <span className="font-medium text-text">{inPersonsWords(warning.act, units)}</span>
          </Item>
        </li>
      ))}
    </ul>
  );
}

function goTo(path: string | null, onGo: ((path: string) => void) | undefined): (() => void) | null {
  return path !== null && onGo ? () => onGo(path) : null;
}

interface ItemProps {
  grade: WarningGrade;
  word: string;
  what: string;
  go: (() => void) | null;
  children: React.ReactNode;
}

function Item({ grade, word, what, go, children }: ItemProps) {
  const title = 'text-left text-body font-semibold';
  return (
    <div className={classNames('grid grid-cols-[1.25rem_1fr] gap-x-3', grade === 'danger' && 'text-ember')}>
      <ShapeGlyph shape={dress[grade].shape} className="mt-1.5 size-4" />
      <div>
        <span className="sr-only">{word}: </span>
        {go ? (
          <button
            type="button"
            onClick={go}
            className={`${title} min-h-12 cursor-pointer underline decoration-hair decoration-2 underline-offset-4 hover:decoration-current`}
          >
            {what}
          </button>
        ) : (
          <p className={title}>{what}</p>
        )}
        <p className="text-note text-soft">{children}</p>
      </div>
    </div>
  );
}
