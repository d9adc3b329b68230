import { Disclosure, DisclosureButton, DisclosurePanel } from '@headlessui/react';
import { workings, type FigureRow } from '@steepfall/shared/desk';
import { classNames } from '#components/class-names.ts';
import { ShapeGlyph } from '#components/shapes.tsx';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { DefaultFields } from './default-fields.tsx';
import { figureText } from '#lib/figure-words.ts';

const targetWords = { in: 'on target', below: 'below your target', above: 'above your target' } as const;

interface FigureLineProps {
  row: FigureRow;
  /** As it is saved; null when it was not there, or nothing is saved. */
  before: FigureRow | null;
  isMoved: boolean;
  isEditable: boolean;
}

/** One figure: what it is, its number with the band, what that means; under it, how it is worked out. */
export function FigureLine({ row, before, isMoved, isEditable }: FigureLineProps) {
  const units = useUnits();
  const { value, range, unit, whole } = figureText(row, units);
  const was = before ? figureText(before, units).whole : null;
  const how = workings[row.workings];
  const words = [row.word, row.target ? targetWords[row.target] : null].filter((word) => word !== null);
  return (
    <Disclosure as="li" className="border-b border-hair last:border-b-0">
      <DisclosureButton
        disabled={!how}
        className={classNames(
          'grid min-h-12 w-full grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-4 border-l-4 py-2 pl-3 text-left',
          how && 'cursor-pointer hover:bg-raised data-open:bg-raised',
          isMoved ? 'border-text' : 'border-transparent',
        )}
      >
        <span className="text-body break-words">{row.label}</span>
        <span className="text-right tabular-nums">
          <span className={row.isLead ? 'text-lead font-semibold' : 'text-body font-medium'}>{value}</span>
          {unit ? <span className="text-note text-soft"> {unit}</span> : null}
        </span>
        <span className="flex flex-wrap items-baseline gap-x-2 text-note text-soft">
          {words.length > 0 ? (
            <span className={row.target && row.target !== 'in' ? 'font-medium text-text' : ''}>
              {row.target && row.target !== 'in' ? (
                <ShapeGlyph shape={row.target === 'above' ? 'up' : 'down'} className="mr-1.5 inline size-3" />
              ) : null}
              {words.join(', ')}
            </span>
          ) : null}
        </span>
        <span className="text-right text-note tabular-nums text-soft">
          {range}
          {was !== null && was !== whole ? <span className="block">was {was}</span> : null}
        </span>
        {isMoved ? <span className="sr-only">just changed</span> : null}
        {how ? <span className="sr-only">how is this worked out</span> : null}
      </DisclosureButton>
      {how ? (
        <DisclosurePanel className="grid gap-3 border-l-4 border-edge bg-raised py-4 pl-3 pr-4 text-note">
          <p className="text-body">{inPersonsWords(how.meaning, units)}</p>
          <dl className="grid gap-2">
            <Fact word="Model">{inPersonsWords(how.model, units)}</Fact>
            <Fact word="Source">{how.source}</Fact>
            <Fact word="Band">{inPersonsWords(how.band, units)}</Fact>
            {how.assumptions.length > 0 ? (
              <Fact word="Taken for granted">
                <ul className="grid gap-1">
                  {how.assumptions.map((assumption) => (
                    <li key={assumption}>{inPersonsWords(assumption, units)}</li>
                  ))}
                </ul>
              </Fact>
            ) : null}
          </dl>
          {isEditable && how.defaults.length > 0 ? <DefaultFields names={how.defaults} rowId={row.id} /> : null}
        </DisclosurePanel>
      ) : null}
    </Disclosure>
  );
}

function Fact({ word, children }: { word: string; children: React.ReactNode }) {
  return (
    <div>
      <dt className="font-medium text-soft">{word}</dt>
      <dd>{children}</dd>
    </div>
  );
}
