import type { RunSummary } from '@steepfall/shared/contracts';
import {
  currentStep,
  decide,
  foldRun,
  standingAlerts,
  type RunCommand,
  type RunState,
  type StoredRunEvent,
} from '@steepfall/shared/runs';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { runTimeAt } from '@steepfall/shared/timers';
import request from 'supertest';
import { newId } from '../src/common/ids.js';
import { buildRecipe, usualDocument, type SignedInMember } from './builders.js';
import type { TestApp } from './create-test-app.js';
import { ask, connectMember, type HubSocket } from './sockets.js';

/** A short day: little water, a strong plate, a minute of steep. On a fast clock it is over in seconds. */
const quickDocument: RecipeDocument = {
  ...usualDocument,
  volumeL: 7,
  waterL: 8,
  additions: usualDocument.additions.map((addition) => ({
    ...addition,
    massG: addition.massG / 3,
    ...(addition.kind === 'tea' ? { out: { at: 'timer', durationS: 60 } } : {}),
  })),
};

export async function startRehearsal(
  testApp: TestApp,
  member: SignedInMember,
  options: { rate?: number; seed?: number; probeId?: string; document?: RecipeDocument } = {},
): Promise<RunSummary> {
  const { rate = 60, document = quickDocument, ...others } = options;
  const { revisions } = await buildRecipe(testApp, { author: member, documents: [document] });
  const { status, body } = await request(testApp.url)
    .post('/api/rehearsals')
    .set('authorization', member.bearer)
    .send({ rate, revisionId: revisions[0]!.id, ...others });
  if (status !== 201) throw new Error(JSON.stringify(body));
  return body as RunSummary;
}

/** The kit that goes with the short day. */
export async function addQuickKit({ url }: TestApp, { bearer }: SignedInMember): Promise<void> {
  const kettle = { volumeL: 12, diameterM: 0.25, massKg: 2, heaterPowerW: 9000, heaterEfficiency: 0.9 };
  const chiller = { metal: 'stainless', lengthM: 7.6, coolantC: 12 };
  for (const body of [
    { kind: 'kettle', name: 'Quick kettle', facts: kettle },
    { kind: 'chiller', name: 'Coil', facts: chiller },
  ])
    await request(url).post('/api/equipment').set('authorization', bearer).send(body).expect(201);
}

/** A tablet and the person in front of it: keeps the log of one run as told by the hub, and acts by the rules of the sheet. */
export class Practice {
  private log: StoredRunEvent[] = [];
  private socket: HubSocket | null = null;

  constructor(
    private readonly member: SignedInMember,
    readonly run: RunSummary,
  ) {}

  get events(): StoredRunEvent[] {
    return this.log;
  }

  get state(): RunState {
    return foldRun(this.log);
  }

  get nowMs(): number {
    return runTimeAt(this.state.clock ?? this.run.clock, Date.now());
  }

  async join(testApp: Pick<TestApp, 'url'>): Promise<void> {
    this.socket = await connectMember(testApp, this.member);
    this.socket.on('run.events', ({ events }) => this.add(events));
    const { events } = await ask(this.socket, 'run.join', { runId: this.run.id, afterSeq: this.log.length });
    this.add(events);
  }

  async act(command: RunCommand): Promise<void> {
    const context = { nowMs: this.nowMs, by: this.member.member.id, station: 'tablet', newId };
    const decision = decide(this.state, command, context);
    if (!decision.ok) throw new Error(decision.problem.detail);
    const { stored, refused } = await ask(this.socket!, 'run.append', { runId: this.run.id, events: decision.events });
    if (refused.length > 0) throw new Error(JSON.stringify(refused));
    this.add(stored.map((place, index) => ({ ...decision.events[index]!, ...place })));
  }

  /** Follows the sheet until `isOver`: does each step when its turn has come, and waits for the alert where a level is to be caught. */
  async follow(isOver: (state: RunState) => boolean, withinMs = 15_000): Promise<void> {
    const endsAtMs = Date.now() + withinMs;
    for (let state = this.state; !isOver(state); state = this.state) {
      if (Date.now() > endsAtMs) throw new Error(`Still at "${currentStep(state)?.step.title}".`);
      const command = this.next(state);
      if (command) await this.act(command);
      else await new Promise((resolve) => setTimeout(resolve, 5));
    }
  }

  private next(state: RunState): RunCommand | null {
    const step = currentStep(state)?.step;
    if (!step) return null;
    const isCalled = standingAlerts(state).some(
      ({ actStepId, stage }) => actStepId === step.id && (stage === 'now' || stage === 'missed'),
    );
    if (step.start.by === 'temperature' && !isCalled) return null;
    if (step.done.by === 'hand') return { type: 'completeStep', stepId: step.id, tempC: null };
    if (step.done.by !== 'measurement') return null;
    return { type: 'recordMeasurement', stepId: step.id, quantity: 'pH', value: step.done.min ?? 4, tempC: null };
  }

  private add(events: readonly StoredRunEvent[]): void {
    const known = new Map([...this.log, ...events].map((event) => [event.id, event]));
    this.log = [...known.values()].sort((a, b) => a.seq - b.seq);
  }
}
