import { isChattering, isFault, isFlood } from './alert-priority.js';
import type { AlertRule, LogEntry, RunEvent, RunEventOf } from './events.js';
import type { Alert, RunState } from './state.js';

export interface AlertWait {
  key: string;
  crossing: number;
  rule: AlertRule;
  /** From the call to the answer, s; null while nobody answered. */
  waitS: number | null;
  /** Who answered; null for the watch, or for nobody. */
  by: string | null;
}

export interface AlertAccount {
  /** What the sheet called for, up to "now" or later. */
  callCount: number;
  /** Faults of what helps to watch; one that called twice is one. */
  faultCount: number;
  kinds: { rule: AlertRule; count: number }[];
  waits: AlertWait[];
  medianWaitS: number | null;
  longestWaitS: number | null;
  /** By whom alerts were said to be heard, most first. */
  heardBy: { by: string | null; count: number }[];
  shelved: { key: string; crossing: number; rule: AlertRule; reason: string; forS: number; by: string | null }[];
  /** More than ten calls in ten minutes. */
  hadFlood: boolean;
  /** What came and went three times in a minute. */
  chattering: AlertRule[];
}

const isCalling = ({ rule, stage }: Pick<Alert, 'rule' | 'stage'>) =>
  isFault({ rule }) || stage === 'now' || stage === 'missed';

/**
 * The alerts of a run in numbers: how many by kind, how long each waited for a person, who heard them, what was put aside and why. Times on
 * the run clock; flood and chatter as people lived them, on the wall, where a rehearsal runs fast.
 *
 * @see flood and chatter after EEMUA 191 and ISA-18.2.
 */
export function alertAccount(entries: readonly LogEntry[], state: RunState): AlertAccount {
  const undone = new Set(state.undoneEventIds);
  const events = entries.filter(({ id }) => !undone.has(id)) as RunEvent[];
  const calls = events.filter(
    (event): event is RunEventOf<'alert.raised'> => event.type === 'alert.raised' && isCalling(event.payload),
  );
  const called = state.alerts.filter(isCalling);
  const comings = called.filter((alert) => !isSecondCall(state, alert));
  const waits = called.map((alert) => waitOf(state, alert, firstCall(calls, alert)));
  const waitsS = waits.flatMap(({ waitS }) => waitS ?? []).sort((a, b) => a - b);
  const rate = state.clock?.rate ?? 1;
  const rules = [...new Set(comings.map(({ rule }) => rule))];
  return {
    callCount: comings.filter((alert) => !isFault(alert)).length,
    faultCount: comings.filter(isFault).length,
    kinds: rules.map((rule) => ({ rule, count: comings.filter((alert) => alert.rule === rule).length })),
    waits,
    medianWaitS: medianOf(waitsS),
    longestWaitS: waitsS.at(-1) ?? null,
    heardBy: heardBy(events),
    shelved: shelved(events, state),
    hadFlood: isFlood(calls.map(({ atMs }) => atMs / rate)),
    chattering: rules.filter((rule) =>
      isChatter(
        comings.filter((alert) => alert.rule === rule),
        rate,
      ),
    ),
  };
}

/** A fault that called once more while it was still true: no new one. */
export function isSecondCall(state: RunState, { rule, key, crossing, raisedAtMs }: Alert): boolean {
  if (!isFault({ rule })) return false;
  const before = state.alerts.find((alert) => alert.key === key && alert.crossing === crossing - 1);
  return before !== undefined && (before.clearedAtMs === null || before.clearedAtMs > raisedAtMs);
}

function isChatter(comings: readonly Alert[], rate: number): boolean {
  const keys = new Set(comings.map(({ key }) => key));
  return [...keys].some((key) =>
    isChattering(comings.filter((alert) => alert.key === key).map(({ raisedAtMs }) => raisedAtMs / rate)),
  );
}

function firstCall(calls: readonly RunEventOf<'alert.raised'>[], { key, crossing, raisedAtMs }: Alert): number {
  const own = calls.filter(({ payload }) => payload.key === key && payload.crossing === crossing);
  return Math.min(raisedAtMs, ...own.map(({ atMs }) => atMs));
}

/** Answered by "heard it", by doing the step, by choosing what to do about it, or by putting it aside: whichever came first. */
function waitOf(state: RunState, alert: Alert, calledAtMs: number): AlertWait {
  const { key, crossing, rule } = alert;
  const act = state.steps.find(({ step }) => step.id === alert.actStepId);
  const choice = state.choices.find((one) => one.key === key && one.crossing === crossing);
  const answers = [
    { atMs: alert.acknowledgedAtMs, by: alert.acknowledgedBy },
    { atMs: act?.doneAtMs ?? null, by: act?.doneBy ?? null },
    { atMs: choice?.atMs ?? null, by: choice?.by ?? null },
  ].filter((answer): answer is { atMs: number; by: string | null } => answer.atMs !== null);
  const first = answers.sort((a, b) => a.atMs - b.atMs)[0];
  const waitS = first ? Math.max(0, (first.atMs - calledAtMs) / 1000) : null;
  return { key, crossing, rule, waitS, by: first?.by ?? null };
}

function medianOf(sorted: readonly number[]): number | null {
  const middle = sorted.length / 2;
  const low = sorted[Math.ceil(middle) - 1];
  const high = sorted[Math.floor(middle)];
  return low === undefined || high === undefined ? null : (low + high) / 2;
}

function heardBy(events: readonly RunEvent[]): AlertAccount['heardBy'] {
  const counts = new Map<string | null, number>();
  for (const { type, by } of events) if (type === 'alert.acknowledged') counts.set(by, (counts.get(by) ?? 0) + 1);
  return [...counts].map(([by, count]) => ({ by, count })).sort((a, b) => b.count - a.count);
}

function shelved(events: readonly RunEvent[], state: RunState): AlertAccount['shelved'] {
  return events.flatMap((event) => {
    if (event.type !== 'alert.shelved') return [];
    const { key, crossing, reason, untilMs } = event.payload;
    const rule = state.alerts.find((alert) => alert.key === key && alert.crossing === crossing)?.rule;
    const forS = Math.round((untilMs - event.atMs) / 1000);
    return rule ? [{ key, crossing, rule, reason, forS, by: event.by }] : [];
  });
}
