import { useMemo } from 'react';
import type { FigureGroup, FigureRow } from '@steepfall/shared/desk';
import { Disclosure, DisclosureButton, DisclosurePanel } from '@headlessui/react';
import { LevelRule } from '#components/level-rule.tsx';
import { Chevron } from './chevron.tsx';
import { FigureLine } from './figure-line.tsx';
import { groupWords } from '#lib/figure-words.ts';
import type { Desk, Figures } from './use-desk.ts';

interface FiguresColumnProps {
  desk: Desk;
  /** The figures of what is saved: what moved since says what it was. */
  saved?: Figures | null;
  /** With a form around it the defaults in the drawers can be changed. */
  isEditable?: boolean;
}

/** The figures by group, leads first; each opens on how it is worked out. */
export function FiguresColumn({ desk, saved = null, isEditable = false }: FiguresColumnProps) {
  const { figures, moved } = desk;
  const groups = useMemo(() => (figures ? grouped(figures.rows) : []), [figures]);
  const before = useMemo(() => new Map(saved?.rows.map((row) => [row.id, row])), [saved]);
  if (!figures) return <p className="text-body text-soft">The figures come as soon as every field holds a number.</p>;
  const line = (row: FigureRow) => (
    <FigureLine
      key={row.id}
      row={row}
      before={before.get(row.id) ?? null}
      isMoved={moved.has(row.id)}
      isEditable={isEditable}
    />
  );
  return (
    <div className={desk.isOld ? 'grid gap-7 text-soft' : 'grid gap-7'}>
      {groups.map(({ group, leads, others }) => (
        <div key={group} className="grid">
          <LevelRule level={3}>{groupWords[group]}</LevelRule>
          <ul>{leads.map(line)}</ul>
          {others.length > 0 ? (
            <Disclosure>
              <DisclosureButton className="group flex min-h-12 cursor-pointer items-center gap-2 justify-self-start text-note font-medium text-soft hover:text-text">
                {others.length} more
                <span className="group-data-open:rotate-180">
                  <Chevron isOpen={false} />
                </span>
              </DisclosureButton>
              <DisclosurePanel as="ul">{others.map(line)}</DisclosurePanel>
            </Disclosure>
          ) : null}
        </div>
      ))}
    </div>
  );
}

interface Group {
  group: FigureGroup;
  leads: FigureRow[];
  others: FigureRow[];
}

function grouped(rows: readonly FigureRow[]): Group[] {
  const groups = (Object.keys(groupWords) as FigureGroup[]).map((group): Group => {
    const own = rows.filter((row) => row.group === group);
    const leads = own.filter(({ isLead }) => isLead);
    // A group without a lead shows what it has.
    return leads.length > 0
      ? { group, leads, others: own.filter(({ isLead }) => !isLead) }
      : { group, leads: own, others: [] };
  });
  return groups.filter(({ leads }) => leads.length > 0);
}
