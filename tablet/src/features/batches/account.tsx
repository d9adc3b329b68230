import type { Member } from '@steepfall/shared/contracts';
import type { RunState } from '@steepfall/shared/runs';
import { LevelRule } from '#components/level-rule.tsx';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { accountOf, measurementWords } from './run-account.ts';

/** What was planned with a number and what came of it; then what was measured and noted. */
export function Account({ state, members }: { state: RunState; members: readonly Member[] }) {
  const units = useUnits();
  const rows = accountOf(state, units);
  const who = (memberId: string | null) => members.find(({ id }) => id === memberId)?.displayName;
  return (
    <div className="grid gap-x-14 gap-y-12 xl:grid-cols-[1.2fr_1fr]">
      <section aria-labelledby="account" className="grid min-w-0 content-start gap-4">
        <LevelRule id="account">Planned, and as it happened</LevelRule>
        <table className="w-full border-collapse text-left text-body">
          <thead>
            <tr className="border-b-2 border-edge text-note text-soft">
              <th scope="col" className="py-2 pr-4 font-medium">
                Step
              </th>
              <th scope="col" className="py-2 pr-4 text-right font-medium">
                Planned
              </th>
              <th scope="col" className="py-2 text-right font-medium">
                Happened
              </th>
              <th scope="col" className="hidden py-2 pl-4 text-right font-medium sm:table-cell">
                Off by
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ stepId, title, planned, happened, difference }) => (
              <tr key={stepId} className="border-b border-hair">
                <th scope="row" className="py-3 pr-4 font-medium">
                  {title}
                </th>
                <td className="py-3 pr-4 text-right tabular-nums text-soft">{planned}</td>
                <td className="py-3 text-right font-medium tabular-nums">{happened}</td>
                <td className="hidden py-3 pl-4 text-right tabular-nums text-soft sm:table-cell">{difference}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      <section aria-labelledby="notes" className="grid min-w-0 content-start gap-4">
        <LevelRule id="notes">Measured and noted</LevelRule>
        {state.measurements.length === 0 && state.notes.length === 0 ? (
          <p className="text-lead text-soft">
            Nothing was measured by hand or noted. A note on the run sheet lands here.
          </p>
        ) : null}
        <ul className="grid gap-4">
          {state.measurements.map(({ eventId, quantity, value, atMs, by, stepId }) => (
            <li key={eventId} className="flex flex-wrap items-baseline gap-x-4">
              <span className="text-title tabular-nums">{measurementWords(quantity, value, units)}</span>
              <span className="text-body text-soft">
                {titleOf(state, stepId)} {clockTime(atMs)}
                {who(by) ? `, ${who(by)}` : ''}
              </span>
            </li>
          ))}
          {state.notes.map(({ eventId, text, atMs, by, stepId }) => (
            <li key={eventId} className="border-l-4 border-edge pl-5">
              <p className="whitespace-pre-line text-lead">{text}</p>
              <p className="mt-1 text-body text-soft">
                {titleOf(state, stepId)} {clockTime(atMs)}
                {who(by) ? `, ${who(by)}` : ''}
              </p>
            </li>
          ))}
        </ul>
      </section>
    </div>
  );
}

function titleOf(state: RunState, stepId: string | null): string {
  const title = state.steps.find(({ step }) => step.id === stepId)?.step.title;
  return title ? `${title},` : '';
}
