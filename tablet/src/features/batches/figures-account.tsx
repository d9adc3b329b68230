import { useQuery } from '@tanstack/react-query';
import type { FigureRow } from '@steepfall/shared/desk';
import type { RunSummary } from '@steepfall/shared/contracts';
import {
  accountSoFar,
  figurePairs,
  learnedBase,
  liquidLine,
  NO_LINE,
  type AccountSoFar,
  type RunState,
} from '@steepfall/shared/runs';
import { formatDuration } from '@steepfall/shared/units';
import { useMemo, useState, type ReactNode } from 'react';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { figureText } from '#lib/figure-words.ts';
import { runReadingsQuery } from '#lib/hub-queries.ts';
import { formatLevel, useUnits } from '#lib/units.ts';
import { clockTime, spanWords } from '#lib/words.ts';
import { LeafBaseProposal } from './leaf-base-proposal.tsx';

const BUCKETS = 900;

/** The figures of the desk twice: as they were planned, and from the recorded line. */
export function FiguresAccount({ run, state }: { run: RunSummary; state: RunState }) {
  const units = useUnits();
  const [isWhole, setIsWhole] = useState(false);
  const isOver = state.status === 'ended';
  const readings = useQuery({
    ...runReadingsQuery(run.id, { buckets: BUCKETS }),
    refetchInterval: isOver ? false : 10_000,
  });
  const line = useMemo(
    () => (readings.data ? liquidLine(readings.data.readings, run.probeLagS) : NO_LINE),
    [readings.data, run.probeLagS],
  );
  const { account, pairs, learned } = useMemo(() => {
    const result = accountSoFar(state, line, state.endedAtMs ?? line.points.at(-1)?.atMs ?? state.startedAtMs ?? 0);
    if (result.kind !== 'account') return { account: result, pairs: [], learned: null };
    return { account: result, pairs: figurePairs(state, result, units), learned: learnedBase(state, line) };
  }, [state, line, units]);
  if (account.kind === 'none') {
    return (
      <Frame>
        <p className="max-w-prose text-lead text-soft">
          {account.why === 'older-build'
            ? 'This run was started by an older build. It does not know its recipe, so there are no figures.'
            : 'The run has not begun.'}
        </p>
      </Frame>
    );
  }
  if (account.kind === 'impossible') {
    return (
      <Frame>
        <p className="max-w-prose text-lead">The figures cannot be worked out: {account.what}</p>
      </Frame>
    );
  }
  const shown = isWhole ? pairs : pairs.filter(({ isLead }) => isLead);
  const cell = (row: FigureRow | null) => {
    if (!row) return '–';
    const { value, unit } = figureText(row, units);
    return unit ? `${value} ${unit}` : value;
  };
  return (
    <Frame
      aside={
        <Button aria-pressed={isWhole} onClick={() => setIsWhole(!isWhole)}>
          {isWhole ? 'Only the main ones' : 'All figures'}
        </Button>
      }
    >
      <table className="w-full border-collapse text-left text-body">
        <thead>
          <tr className="border-b-2 border-edge text-note text-soft">
            <th scope="col" className="py-2 pr-4 font-medium">
              Figure
            </th>
            <th scope="col" className="py-2 pr-4 text-right font-medium">
              Planned
            </th>
            <th scope="col" className="py-2 text-right font-medium">
              {isOver ? 'As it happened' : 'So far'}
            </th>
            <th scope="col" className="hidden py-2 pl-4 text-right font-medium md:table-cell">
              What the model leaves open
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.map(({ id, label, planned, happened }) => (
            <tr key={id} className="border-b border-hair align-baseline">
              <th scope="row" className="py-3 pr-4 font-medium">
                {label}
              </th>
              <td className="py-3 pr-4 text-right tabular-nums text-soft">{cell(planned)}</td>
              <td className="py-3 text-right tabular-nums">
                <span className="font-medium">{cell(happened)}</span>
                {happened?.word ? <span className="block text-note text-soft">{happened.word}</span> : null}
              </td>
              <td className="hidden py-3 pl-4 text-right tabular-nums text-soft md:table-cell">
                {happened ? figureText(happened, units).range : ''}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <Rests account={account} />
      {learned && isOver && state.document ? <LeafBaseProposal learned={learned} run={run} /> : null}
    </Frame>
  );
}

function Frame({ aside, children }: { aside?: ReactNode; children: ReactNode }) {
  return (
    <section aria-labelledby="figures" className="grid min-w-0 content-start gap-4">
      <LevelRule id="figures" aside={aside}>
        The figures
      </LevelRule>
      {children}
    </section>
  );
}

/** The cooling rule, and what the account could not see. */
function Rests({ account: { cooling, day, isLineKnown } }: { account: AccountSoFar }) {
  const units = useUnits();
  const fall = `${formatLevel(57, units)} to ${formatLevel(21, units)}`;
  return (
    <ul className="grid max-w-prose gap-1 text-body text-soft">
      {cooling.kind === 'there' ? (
        <li className="text-text">
          From {fall} in {spanWords(cooling.tookS)}: {cooling.isInTime ? 'within' : 'longer than'} the two hours of the
          cooling rule. What a keg did in the fridge was not measured here; local codes come first.
        </li>
      ) : null}
      {cooling.kind === 'running' ? (
        <li className="text-text">
          The record ends before {formatLevel(21, units)}: the fall from {formatLevel(57, units)} is not shown to the
          end.
        </li>
      ) : null}
      {isLineKnown ? null : <li>No temperature was recorded: what depends on it has no figure.</li>}
      {day.gaps.map(({ fromMs, toMs }) => (
        <li key={fromMs}>
          No reading from {clockTime(fromMs)} for {formatDuration((toMs - fromMs) / 1000)}: a straight line is drawn
          over it.
        </li>
      ))}
    </ul>
  );
}
