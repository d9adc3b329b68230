import { useMemo } from 'react';
import type { Revision } from '@steepfall/shared/contracts';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { formatMass, formatVolume } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { LevelRule } from '#components/level-rule.tsx';
import { SheetSteps } from '#components/sheet-steps.tsx';
import { useKnown } from '#lib/session.ts';
import { formatLevel, inPersonsWords, useUnits } from '#lib/units.ts';
import { compiledSheet } from './compiled-sheet.ts';
import { conditionWords } from './condition-words.ts';
import { CostLines } from './cost-lines.tsx';
import { KitChooser, useDeskKit } from './desk-kit.tsx';
import { FallLine } from './fall-line.tsx';
import { FiguresColumn } from './figures-column.tsx';
import { useDesk } from './use-desk.ts';
import { WarningList } from './warning-list.tsx';

/** One revision to read: what goes in, the day it makes, the figures, the sheet. */
export function RevisionView({ revision }: { revision: Revision }) {
  const { house } = useKnown();
  const units = useUnits();
  const { document, note, createdBy, createdAtMs } = revision;
  const { kit } = useDeskKit();
  const desk = useDesk(document, kit, units);
  const sheet = useMemo(() => compiledSheet(document, house.altitudeM), [document, house.altitudeM]);
  return (
    <>
      {note ? (
        <p className="max-w-prose border-l-4 border-edge pl-5 text-lead">
          {note}
          <span className="mt-1 block text-body text-soft">
            {createdBy}, {format(createdAtMs, 'd MMMM yyyy')}
          </span>
        </p>
      ) : null}
      <div className="grid gap-x-12 gap-y-12 lg:grid-cols-[minmax(0,1fr)_minmax(0,23rem)]">
        <div className="grid min-w-0 content-start gap-12">
          <section aria-labelledby="line" className="grid min-w-0 content-start gap-4">
            <LevelRule id="line">The planned day</LevelRule>
            {desk.figures ? <FallLine day={desk.figures.day} document={document} /> : null}
          </section>
          <WhatGoesIn document={document} />
          <section aria-labelledby="look-out" className="grid min-w-0 content-start gap-4">
            <LevelRule id="look-out">To look out for</LevelRule>
            <WarningList warnings={desk.figures?.warnings ?? []} impossible={desk.impossible} />
          </section>
        </div>
        <section aria-labelledby="figures" className="grid min-w-0 content-start gap-7">
          <LevelRule id="figures">Figures</LevelRule>
          <KitChooser />
          <FiguresColumn desk={desk} />
          <CostLines document={document} />
        </section>
      </div>
      <section aria-labelledby="sheet" className="grid min-w-0 gap-5">
        <LevelRule id="sheet" aside={typeof sheet === 'string' ? null : `${sheet.steps.length} steps`}>
          The run sheet it gives
        </LevelRule>
        {typeof sheet === 'string' ? (
          <p className="text-lead text-ember">{inPersonsWords(sheet, units)}</p>
        ) : (
          <SheetSteps sheet={sheet} />
        )}
      </section>
    </>
  );
}

function WhatGoesIn({ document }: { document: RecipeDocument }) {
  const units = useUnits();
  const { targets, gas, steepC, transferC } = document;
  const perLitre = (massG: number) => `${Number((massG / document.waterL).toPrecision(2))} g/L`;
  const range = ({ min, max }: { min: number; max: number }) => `${min} to ${max}`;
  const waters = document.waters
    .filter(({ percent }) => percent > 0)
    .map(({ name, percent }) => (percent < 100 ? `${percent} % ${name}` : name));
  const facts: [string, string][] = [
    ['steep', formatLevel(steepC, units)],
    ['into the keg at', formatLevel(transferC, units)],
    ['water, cold', `pH ${range(targets.waterPh)}`],
    ...(targets.drinkPh ? [['drink, still', `pH ${range(targets.drinkPh)}`] satisfies [string, string]] : []),
    ...(targets.caffeineMostMgPerL
      ? [['caffeine at most', `${targets.caffeineMostMgPerL} mg/L`] satisfies [string, string]]
      : []),
    ['gas', `${gas.volumes} volumes at ${formatLevel(gas.tempC, units)}`],
  ];
  return (
    <section aria-labelledby="goes-in" className="grid min-w-0 content-start gap-5">
      <LevelRule id="goes-in">What goes in</LevelRule>
      <ul>
        <Ingredient
          amount={formatVolume(document.waterL, { unit: units.volume })}
          name={waters.join(', ')}
          note={`for ${formatVolume(document.volumeL, { unit: units.volume })} of drink`}
        />
        {document.additions.map((addition) => (
          <Ingredient
            key={addition.id}
            amount={formatMass(addition.massG, { unit: units.mass })}
            name={addition.name}
            note={[perLitre(addition.massG), conditionWords(addition, units), addition.bag].filter(Boolean).join(' · ')}
          />
        ))}
      </ul>
      <dl className="grid gap-x-10 sm:grid-cols-2">
        {facts.map(([word, text]) => (
          <div key={word} className="flex items-baseline justify-between gap-4 border-b border-hair py-2.5">
            <dt className="text-body text-soft">{word}</dt>
            <dd className="text-body font-medium tabular-nums">{text}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

function Ingredient({ amount, name, note }: { amount: string; name: string; note: string }) {
  return (
    <li className="grid grid-cols-[5.5rem_1fr] items-baseline gap-x-5 border-b border-hair py-3">
      <span className="text-right text-lead font-semibold tabular-nums">{amount}</span>
      <span className="min-w-0">
        <span className="block text-lead break-words">{name}</span>
        <span className="block text-note text-soft">{note}</span>
      </span>
    </li>
  );
}
