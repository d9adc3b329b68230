import { setImmediate } from 'node:timers/promises';
import { Injectable } from '@nestjs/common';
import type { LessonAnswer, ReachLesson, RunLearned } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { learnedReach, learnInTurns, type FinishedRun, type Lesson, type RunLessons } from '@steepfall/shared/watch';
import { MembersService } from '../members/members.service.js';
import { RunReadingsService } from '../readings/run-readings.service.js';
import { callsOf, type MemberCall } from './learned-calls.js';
import { finishedRun } from './learned-run.js';
import { RunLogService } from './run-log.service.js';
import type { RunLog } from './run-log.js';
import { RunSummariesService } from './run-summaries.service.js';

/** A run has two or three calls to act: ten calls lie in fewer runs than this. */
const NEWEST_RUNS = 8;

/** What a run that is over teaches. It only says so: whoever wants it kept saves it where it belongs. */
@Injectable()
export class LearnedService {
  constructor(
    private readonly logs: RunLogService,
    private readonly summaries: RunSummariesService,
    private readonly readings: RunReadingsService,
    private readonly members: MembersService,
  ) {}

  async get(houseId: string, runId: string): Promise<RunLearned> {
    const log = await this.logs.get(houseId, runId);
    if (log.isOpen) throw new ProblemError('run-not-ended', 'A run teaches when it is over: end it, then look again.');
    const { kit } = log.state;
    const lessons = await learned(finishedRun(log.state, log.driverConfig.watch, await this.readings.brewed(log)));
    const answer = (lesson: Lesson, told: number | undefined): LessonAnswer => ({ told: told ?? null, ...lesson });
    return {
      runId,
      isRehearsal: log.facts.isRehearsal,
      lagS: answer(lessons.lagS, log.facts.probeId === null ? undefined : log.facts.probeLagS),
      coolingPerS: answer(lessons.coolingPerS, kit?.kettle?.coolingConstantPerS),
      chillingPerS: answer(lessons.chillingPerS, kit?.chiller?.coolingConstantPerS),
      heaterEfficiency: answer(lessons.heaterEfficiency, kit?.kettle?.heaterEfficiency),
      reach: await this.reachIn(houseId, log),
    };
  }

  /** On the clock of a rehearsal seconds are not those of a person: it teaches no reach. */
  private async reachIn(houseId: string, log: RunLog): Promise<ReachLesson[]> {
    if (log.facts.isRehearsal) return [];
    const here = new Set(callsOf(log.events, log.state).map(({ memberId }) => memberId));
    if (here.size === 0) return [];
    const calls = await this.callsUpTo(houseId, log);
    const members = await this.members.list(houseId);
    return members
      .filter(({ id }) => here.has(id))
      .map(({ id, displayName, reachS }) => ({
        memberId: id,
        displayName,
        toldS: reachS ?? null,
        ...learnedReach(calls.filter(({ memberId }) => memberId === id)),
      }));
  }

  private async callsUpTo(houseId: string, log: RunLog): Promise<MemberCall[]> {
    const ended = await this.summaries.list(houseId, 'ended');
    const startedAtMs = log.state.startedAtMs ?? 0;
    const earlier = ended
      .filter((run) => !run.isRehearsal && run.id !== log.id && run.startedAtMs <= startedAtMs)
      .slice(0, NEWEST_RUNS - 1);
    const logs = [log];
    for (const { id } of earlier) logs.push(await this.logs.get(houseId, id));
    return logs.flatMap(({ events, state }) => callsOf(events, state)).sort((a, b) => a.atMs - b.atMs);
  }
}

/** Other runs are watched in between: their alerts must not wait for a look at the past. */
async function learned(run: FinishedRun): Promise<RunLessons> {
  const turns = learnInTurns(run);
  for (;;) {
    const { done, value } = turns.next();
    if (done) return value;
    await setImmediate();
  }
}
