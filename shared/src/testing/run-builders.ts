import { v5 as uuidV5 } from 'uuid';
import type { RunEvent, RunEventOf, RunEventType } from '../runs/index.js';
import { runSheetSchema, type RunSheet, type Step } from '../sheets/index.js';
import { wallClock } from '../timers/index.js';

const NAMESPACE = '0a3f6c1e-8b1d-4f53-9c5b-2f5f0a7e1d11';

/** A UUID that is the same each time for the same name. */
export function idOf(name: string): string {
  return uuidV5(name, NAMESPACE);
}

/** Ids that sort as they were made, like the UUIDv7 of one device. */
function orderedId(index: number): string {
  return `00000000-0000-7000-8000-${index.toString(16).padStart(12, '0')}`;
}

export const RUN_ID = idOf('run');
export const MEMBER_ID = idOf('member');
export const START_MS = Date.UTC(2026, 2, 14, 9, 0, 0);

export function buildStep(overrides: Partial<Step> & Pick<Step, 'id'>): Step {
  return {
    kind: 'prepare',
    title: overrides.id,
    start: { by: 'hand' },
    done: { by: 'hand' },
    amounts: [],
    acts: [],
    meanwhile: [],
    cautions: [],
    settings: [],
    reachS: 10,
    ...overrides,
  };
}

/** Heat to 76 °C, tea in, steep three minutes, tea out, chiller on, hops in at 62 °C, transfer at 20 °C. */
export function buildSheet(steps?: Step[]): RunSheet {
  return runSheetSchema.parse({
    volumeL: 20,
    steps: steps ?? [
      buildStep({ id: 'light-heat', kind: 'heat', title: 'Light the heat', acts: ['heat-on'] }),
      buildStep({
        id: 'heat',
        kind: 'heat',
        title: 'Heat to steep',
        done: { by: 'temperature', direction: 'rising', tempC: 76 },
      }),
      buildStep({
        id: 'tea-in',
        kind: 'add',
        title: 'Tea in',
        amounts: [{ name: 'sencha', massG: 120, bag: 'bag 1' }],
        acts: ['heat-off', 'tea-in'],
      }),
      buildStep({
        id: 'steep',
        kind: 'steep',
        title: 'Steep',
        done: { by: 'timer', durationS: 180 },
        meanwhile: [{ id: 'weigh-hops', text: 'weigh the hops' }],
      }),
      buildStep({ id: 'tea-out', kind: 'remove', title: 'Tea out', acts: ['tea-out'] }),
      buildStep({ id: 'chill', kind: 'chill', title: 'Chiller on', acts: ['chiller-on'] }),
      buildStep({
        id: 'hops-in',
        kind: 'catch',
        title: 'Hops in',
        start: { by: 'temperature', direction: 'falling', tempC: 62 },
        amounts: [{ name: 'Cascade', massG: 60, bag: 'bag 2' }],
        acts: ['hops-in'],
      }),
      buildStep({ id: 'transfer', kind: 'transfer', title: 'Fill the keg' }),
    ],
  });
}

/** The first call for the hops. */
export function buildAlert(
  overrides: Partial<RunEventOf<'alert.raised'>['payload']> = {},
): RunEventOf<'alert.raised'>['payload'] {
  return {
    key: 'hops-in',
    crossing: 1,
    rule: 'temperature',
    stage: 'coming-up',
    stepId: 'hops-in',
    actStepId: 'hops-in',
    tempC: 66,
    targetC: 62,
    direction: 'falling',
    dueAtMs: START_MS + 60_000,
    ...overrides,
  };
}

/** The call for the tea to come out, three minutes after the start. */
export function buildTimerAlert(
  overrides: Partial<RunEventOf<'alert.raised'>['payload']> = {},
): RunEventOf<'alert.raised'>['payload'] {
  return buildAlert({
    key: 'steep',
    rule: 'timer',
    stage: 'now',
    stepId: 'steep',
    actStepId: 'tea-out',
    tempC: null,
    targetC: null,
    direction: null,
    dueAtMs: START_MS + 180_000,
    ...overrides,
  });
}

/** A log with a start, and a way to write the next events: ids and times follow from what was written before. */
export class LogBuilder {
  readonly entries: RunEvent[] = [];
  private nowMs = START_MS;

  constructor(sheet: RunSheet = buildSheet(), overrides: Partial<RunEventOf<'run.started'>['payload']> = {}) {
    this.add('run.started', {
      title: 'Sencha and Cascade',
      batchId: null,
      batchNumber: null,
      revisionId: null,
      isRehearsal: false,
      sheet,
      clock: wallClock(START_MS),
      ...overrides,
    });
  }

  wait(durationS: number): this {
    this.nowMs += durationS * 1000;
    return this;
  }

  add<Type extends RunEventType>(
    type: Type,
    payload: RunEventOf<Type>['payload'],
    envelope: Partial<Pick<RunEvent, 'id' | 'atMs' | 'by' | 'station'>> = {},
  ): this {
    const event = {
      id: orderedId(this.entries.length),
      runId: RUN_ID,
      type,
      v: 1,
      atMs: this.nowMs,
      by: MEMBER_ID,
      station: 'tablet',
      payload,
      ...envelope,
    } as RunEvent;
    this.entries.push(event);
    return this;
  }

  done(...stepIds: string[]): this {
    for (const stepId of stepIds) this.add('step.done', { stepId, cause: 'hand', tempC: null });
    return this;
  }

  undo(eventId: string | undefined): this {
    return this.add('event.undone', { eventId: eventId ?? '' });
  }

  get lastId(): string {
    return this.entries.at(-1)?.id ?? '';
  }

  get last(): RunEvent {
    const last = this.entries.at(-1);
    if (!last) throw new Error('The log is empty.');
    return last;
  }

  /** As the hub keeps it: with sequence numbers. */
  get stored(): (RunEvent & { seq: number; receivedAtMs: number; sentBy: string | null })[] {
    return this.entries.map((event, index) => ({
      ...event,
      seq: index + 1,
      receivedAtMs: event.atMs,
      sentBy: event.by,
    }));
  }
}
