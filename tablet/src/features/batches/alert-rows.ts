import {
  alertWords,
  isFault,
  isSecondCall,
  type Alert,
  type AlertAccount,
  type AlertRule,
  type LogEntry,
  type RunEventOf,
  type RunState,
} from '@steepfall/shared/runs';
import { formatDuration, type UnitPreferences } from '@steepfall/shared/units';
import { spanWords } from '#lib/words.ts';

export interface AlertRow {
  id: string;
  isFault: boolean;
  verb: string;
  number: string | null;
  /** Run clock of each stage that was raised; of a fault, each time it called. */
  stages: { word: string; isLoud: boolean; atMs: number }[];
  outcome: string;
}

const stageWords = { 'coming-up': 'coming up', 'stand-by': 'stand by', now: 'now', missed: 'late' } as const;

type Raised = LogEntry & RunEventOf<'alert.raised'>;

function stagesOf(alert: Alert, raised: readonly Raised[], state: RunState): AlertRow['stages'] {
  const calls = isFault(alert) ? callsOf(alert, state) : [{ key: alert.key, crossing: alert.crossing }];
  return raised
    .filter(({ payload }) => calls.some(({ key, crossing }) => key === payload.key && crossing === payload.crossing))
    .map(({ payload: { stage }, atMs }) => ({ stage, atMs }))
    .sort((a, b) => a.atMs - b.atMs)
    .map(({ stage, atMs }, index) => ({
      word: isFault(alert) ? (index === 0 ? 'called' : 'again') : stageWords[stage],
      isLoud: !isFault(alert) && (stage === 'now' || stage === 'missed'),
      atMs,
    }));
}

/** A fault with the calls that followed while it was still true. */
function callsOf(alert: Alert, state: RunState): Alert[] {
  const calls = [alert];
  for (;;) {
    const last = calls.at(-1);
    const next = state.alerts.find(
      (other) => other.key === alert.key && other.crossing === (last?.crossing ?? 0) + 1 && isSecondCall(state, other),
    );
    if (!next) return calls;
    calls.push(next);
  }
}

const choiceWords = {
  hold: 'added and held',
  more: 'added with more',
  reheat: 'heated up again',
  accept: 'added late',
} as const;

function outcomeOf(alert: Alert, state: RunState, waits: AlertAccount['waits']): string {
  if (isFault(alert)) {
    const { clearedAtMs } = callsOf(alert, state).at(-1) ?? alert;
    if (clearedAtMs !== null) return `over after ${spanWords((clearedAtMs - alert.raisedAtMs) / 1000)}`;
  }
  const waitS = waits.find(({ key, crossing }) => key === alert.key && crossing === alert.crossing)?.waitS ?? null;
  const choice = state.choices.find(({ key, crossing }) => key === alert.key && crossing === alert.crossing)?.choice;
  const chosen = choice ? `, ${choiceWords[choice]}` : '';
  if (waitS !== null) return `answered after ${formatDuration(waitS)}${chosen}`;
  const isDone = state.steps.some(({ step, doneAtMs }) => step.id === alert.actStepId && doneAtMs !== null);
  return isDone || alert.acknowledgedAtMs !== null ? 'done before it was due' : 'not answered';
}

/** Every alert with its climb, and what came of it. A fault that called again is one. */
export function alertRowsOf(
  log: readonly LogEntry[],
  state: RunState,
  { waits }: AlertAccount,
  { temperature }: UnitPreferences,
): AlertRow[] {
  const raised = log.filter((entry): entry is Raised => entry.type === 'alert.raised');
  return state.alerts
    .filter((alert) => !isSecondCall(state, alert))
    .map((alert) => {
      const { verb, number } = alertWords(state, alert, temperature);
      return {
        id: `${alert.key}/${alert.crossing}`,
        isFault: isFault(alert),
        verb,
        number,
        stages: stagesOf(alert, raised, state),
        outcome: outcomeOf(alert, state, waits),
      };
    });
}

const count = (number: number, one: string, many = `${one}s`) => `${number} ${number === 1 ? one : many}`;

const kindWords: Record<AlertRule, (number: number) => string> = {
  temperature: (number) => count(number, 'level'),
  timer: (number) => count(number, 'timer'),
  signal: (number) => `${count(number, 'time')} the probe`,
  hub: (number) => `${count(number, 'time')} the hub`,
  battery: (number) => `${count(number, 'time')} a battery`,
  station: (number) => `${count(number, 'time')} a tablet`,
};

/** "3 calls (2 levels, 1 timer), 0 faults" */
export function countText({ callCount, faultCount, kinds }: AlertAccount): string {
  const words = (areFaults: boolean) =>
    kinds
      .filter((kind) => isFault(kind) === areFaults)
      .map((kind) => kindWords[kind.rule](kind.count))
      .join(', ');
  const inBrackets = (text: string) => (text ? ` (${text})` : '');
  const calls = `${count(callCount, 'call')}${inBrackets(words(false))}`;
  return `${calls}, ${count(faultCount, 'fault')}${inBrackets(words(true))}`;
}

/** How long people were waited for, who heard, what was put aside, and whether there was more than anybody can listen to. */
export function accountLines(account: AlertAccount, nameOf: (memberId: string | null) => string): string[] {
  const { medianWaitS, longestWaitS, heardBy, shelved, hadFlood, chattering } = account;
  const lines: string[] = [];
  if (medianWaitS !== null && longestWaitS !== null)
    lines.push(
      `From call to answer: ${formatDuration(medianWaitS)} at the median, ${formatDuration(longestWaitS)} at the longest.`,
    );
  if (heardBy.length > 0)
    lines.push(`Heard by ${heardBy.map(({ by, count: times }) => `${nameOf(by)} (${times})`).join(', ')}.`);
  for (const { rule, reason, forS, by } of shelved)
    lines.push(
      `Put aside for ${spanWords(forS)} by ${nameOf(by)}: ${kindWords[rule](1).replace('1 time ', '')}, “${reason}”.`,
    );
  if (hadFlood) lines.push('A flood: more than ten calls within ten minutes. People stop listening then.');
  if (chattering.length > 0) {
    const what = chattering.map((rule) => kindWords[rule](1).replace(/^1 (time )?/, '')).join(', ');
    lines.push(`Came and went three times within a minute: ${what}.`);
  }
  return lines;
}
