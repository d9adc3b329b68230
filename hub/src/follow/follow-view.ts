import type { FollowedAlert, FollowedRun, FollowedStep } from '@steepfall/shared/contracts';
import {
  alertWords,
  currentStep,
  isShelved,
  standingAlerts,
  stepPosition,
  upcomingSteps,
  type Alert,
  type LiveView,
  type RunState,
} from '@steepfall/shared/runs';
import type { Step } from '@steepfall/shared/sheets';
import { runTimeAt, type RunClock } from '@steepfall/shared/timers';
import type { UnitPreferences } from '@steepfall/shared/units';
import { alertTag } from './push-news.js';

const NEXT_COUNT = 2;

export interface FollowViewInput {
  state: RunState;
  /** What the watch says; `null` without a probe, and while it is being brought up to date. */
  live: LiveView | null;
  units: UnitPreferences;
  nowMs: number;
  pushKey: string | null;
  expiresAtMs: number;
}

/** One run as a phone shows it: words, numbers and deadlines, no names and no ids of the house. */
export function followedRun({ state, live, units, ...others }: FollowViewInput): FollowedRun {
  const clock = state.clock as RunClock;
  const nowRunMs = runTimeAt(clock, others.nowMs);
  const step = currentStep(state)?.step;
  return {
    title: state.title,
    isRehearsal: state.isRehearsal,
    status: state.status === 'ended' ? 'ended' : 'running',
    outcome: state.outcome,
    clock,
    startedAtMs: state.startedAtMs ?? clock.anchorRunMs,
    position: stepPosition(state),
    step: step ? followedStep(step) : null,
    next: upcomingSteps(state, NEXT_COUNT).map((progress) => followedStep(progress.step)),
    timers: state.timers.map(({ id, label, endsAtMs }) => ({ id, label, endsAtMs: Math.round(endsAtMs) })),
    alerts: standingAlerts(state)
      .filter((alert) => !isShelved(alert, nowRunMs))
      .map((alert) => followedAlert(state, alert, live, units)),
    liquid: live ? liquidOf(live) : null,
    crossing: live ? crossingOf(state, live) : null,
    units,
    ...others,
  };
}

function followedStep({ title, detail, amounts, start, done }: Step): FollowedStep {
  const level = [start, done].find((condition) => condition.by === 'temperature');
  return {
    title,
    detail: detail ?? '',
    amounts,
    level: level ? { tempC: level.tempC, direction: level.direction } : null,
  };
}

function followedAlert(state: RunState, alert: Alert, live: LiveView | null, units: UnitPreferences): FollowedAlert {
  const { verb, sentence, amounts } = alertWords(state, alert, units.temperature);
  const { rule, stage, targetC, raisedAtMs } = alert;
  const dueAtMs = dueAtMsOf(alert, live);
  return { tag: alertTag(alert), rule, stage, verb, sentence, amounts, targetC, raisedAtMs, dueAtMs: rounded(dueAtMs) };
}

/** The forecast goes on after the alert was raised; a deadline stays. */
function dueAtMsOf(alert: Alert, live: LiveView | null): number | null {
  const isSameLevel = alert.rule === 'temperature' && live?.target?.stepId === alert.stepId;
  return (isSameLevel && live ? forecastAtMs(live) : null) ?? alert.dueAtMs;
}

function forecastAtMs({ forecast }: LiveView): number | null {
  return forecast?.kind === 'forecast' || forecast?.kind === 'crossed' ? forecast.atMs : null;
}

function liquidOf({ estimate }: LiveView): FollowedRun['liquid'] {
  const { status, mode, tempC, rateCPerMin, lastGoodAtMs } = estimate;
  return { status, mode, tempC, rateCPerMin, lastHeardAtMs: rounded(lastGoodAtMs) };
}

function crossingOf(state: RunState, live: LiveView): FollowedRun['crossing'] {
  const { target, forecast } = live;
  if (!target) return null;
  const title = state.steps.find(({ step }) => step.id === target.actStepId)?.step.title ?? 'The level';
  return { title, tempC: target.tempC, atMs: forecast?.kind === 'forecast' ? Math.round(forecast.atMs) : null };
}

function rounded(atMs: number | null): number | null {
  return atMs === null ? null : Math.max(0, Math.round(atMs));
}
