import type { Member } from '@steepfall/shared/contracts';
import { describeEvent, type RunEvent, type RunState } from '@steepfall/shared/runs';
import type { UnitPreferences } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { classNames } from '#components/class-names.ts';
import type { StoredEntry } from '#lib/hub-queries.ts';
import { inPersonsWords, useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import type { Flag } from './flag-layout.ts';

interface RunLogProps {
  log: readonly StoredEntry[];
  state: RunState;
  flags: readonly Flag[];
  members: readonly Member[];
}

function nameOf(members: readonly Member[], memberId: string | null): string | null {
  if (memberId === null) return null;
  return members.find(({ id }) => id === memberId)?.displayName ?? 'a former member';
}

function wordsOf(entry: StoredEntry, log: readonly StoredEntry[], state: RunState, units: UnitPreferences): string {
  const event = entry as unknown as RunEvent;
  if (event.type !== 'event.undone') return eventWords(entry, state, units);
  const target = log.find(({ id }) => id === event.payload.eventId);
  return target ? `Taken back: ${eventWords(target, state, units)}` : 'Taken back';
}

/** Only what was measured is turned into the person's units: a note stays as it was written. */
function eventWords(entry: StoredEntry, state: RunState, units: UnitPreferences): string {
  const words = describeEvent(entry, state, units.temperature);
  return entry.type === 'measurement.recorded' ? inPersonsWords(words, units) : words;
}

/** Everything that happened, in words, in the hub's order. What was taken back stays, struck through. */
export function RunLog({ log, state, flags, members }: RunLogProps) {
  const units = useUnits();
  const undone = new Set(state.undoneEventIds);
  return (
    <ol className="border-l-2 border-edge">
      {log.map((entry, index) => {
        const flag = flags.find(({ id }) => id === entry.id);
        const who = nameOf(members, entry.by) ?? 'the watch';
        const sender =
          entry.by !== null && entry.sentBy !== null && entry.sentBy !== entry.by
            ? nameOf(members, entry.sentBy)
            : null;
        const previous = log[index - 1];
        const isNewDay = previous !== undefined && format(previous.atMs, 'yyyyMMdd') !== format(entry.atMs, 'yyyyMMdd');
        const isUndone = undone.has(entry.id);
        return (
          <li key={entry.id}>
            {isNewDay ? (
              <p className="py-3 pl-6 text-lead font-semibold">{format(entry.atMs, 'EEEE, d MMMM')}</p>
            ) : null}
            <div className="relative grid grid-cols-[4rem_1fr] gap-x-3 py-1.5 pl-6 sm:grid-cols-[4rem_2.25rem_1fr_auto]">
              <span
                aria-hidden="true"
                className={classNames('absolute left-0 top-[1.15rem] h-0.5 bg-edge', flag ? 'w-4' : 'w-2')}
              />
              <time dateTime={new Date(entry.atMs).toISOString()} className="text-body text-soft tabular-nums">
                {clockTime(entry.atMs)}
              </time>
              <span className="hidden sm:block">
                {flag ? (
                  <span className="inline-block min-w-7 bg-text px-1.5 text-center text-note font-semibold text-ground tabular-nums">
                    <span className="sr-only">Flag </span>
                    {flag.number}
                  </span>
                ) : null}
              </span>
              <p className={classNames('text-body', flag && 'font-medium', isUndone && 'line-through decoration-2')}>
                {flag ? (
                  <span
                    aria-hidden="true"
                    className="mr-2 inline-block min-w-6 bg-text px-1 text-center text-note text-ground sm:hidden"
                  >
                    {flag.number}
                  </span>
                ) : null}
                {wordsOf(entry, log, state, units)}
                {isUndone ? <span className="sr-only"> (taken back later)</span> : null}
              </p>
              <p className="col-start-2 text-note text-soft sm:col-start-auto sm:text-right">
                {who}
                {sender ? `, sent by ${sender}` : ''}
                <span className="hidden xl:inline"> · {entry.station}</span>
              </p>
            </div>
          </li>
        );
      })}
    </ol>
  );
}
