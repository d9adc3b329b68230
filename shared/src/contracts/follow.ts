import { z } from 'zod';
import { alertRuleSchema, alertStageSchema } from '../runs/index.js';
import { directionSchema, stepAmountSchema } from '../sheets/index.js';
import { runClockSchema } from '../timers/index.js';
import { unitPreferencesSchema } from './api.js';

const id = z.uuid();
const atMs = z.int().nonnegative();

/** Following a run on a phone: a link that shows one run, read-only, without a sign-in. */
export const followLinkSchema = z
  .object({
    id,
    createdAtMs: atMs,
    /** The name of who made it. */
    createdBy: z.string(),
    /** At the latest; an hour after the end of the run if that is earlier. */
    expiresAtMs: atMs,
    /** Phones that get notifications through it. */
    phoneCount: z.int().nonnegative(),
  })
  .meta({ id: 'FollowLink' });
export type FollowLink = z.infer<typeof followLinkSchema>;

/** The token is shown this once. It stands behind the `#` of the link, which no proxy and no log ever sees. */
export const newFollowLinkSchema = z
  .object({ link: followLinkSchema, followToken: z.string() })
  .meta({ id: 'NewFollowLink' });
export type NewFollowLink = z.infer<typeof newFollowLinkSchema>;

export const followLinksSchema = z
  .object({
    /** Those that open something now, the newest first. */
    links: z.array(followLinkSchema),
    /** Where a phone on the same network reaches this hub; empty when it answers its own machine only. */
    origins: z.array(z.string()),
  })
  .meta({ id: 'FollowLinks' });
export type FollowLinks = z.infer<typeof followLinksSchema>;

const followedStepSchema = z.object({
  title: z.string(),
  detail: z.string(),
  amounts: z.array(stepAmountSchema),
  /** The level that it waits for. */
  level: z.object({ tempC: z.number(), direction: directionSchema }).nullable(),
});
export type FollowedStep = z.infer<typeof followedStepSchema>;

const followedAlertSchema = z.object({
  /** Names the alert through all its stages. */
  tag: z.string(),
  rule: alertRuleSchema,
  stage: alertStageSchema,
  verb: z.string(),
  sentence: z.string(),
  amounts: z.array(stepAmountSchema),
  targetC: z.number().nullable(),
  /** Run clock, as known now. */
  dueAtMs: atMs.nullable(),
  /** Run clock. */
  raisedAtMs: atMs,
});
export type FollowedAlert = z.infer<typeof followedAlertSchema>;

/** What a follower sees of a run, and nothing else of the house. */
export const followedRunSchema = z
  .object({
    title: z.string(),
    isRehearsal: z.boolean(),
    status: z.enum(['running', 'ended']),
    outcome: z.enum(['finished', 'abandoned']).nullable(),
    clock: runClockSchema,
    /** Hub wall time of this answer. */
    nowMs: atMs,
    /** Run clock. */
    startedAtMs: atMs,
    position: z.object({ number: z.int(), count: z.int() }),
    /** `null` after the last step. */
    step: followedStepSchema.nullable(),
    next: z.array(followedStepSchema),
    timers: z.array(z.object({ id: z.string(), label: z.string(), endsAtMs: atMs })),
    /** The most urgent first. */
    alerts: z.array(followedAlertSchema),
    /** `null` without a probe. */
    liquid: z
      .object({
        status: z.enum(['starting', 'live', 'stale', 'lost']),
        mode: z.enum(['climbing', 'holding', 'falling']),
        tempC: z.number().nullable(),
        rateCPerMin: z.number().nullable(),
        /** Run clock; when the probe was last heard. */
        lastHeardAtMs: atMs.nullable(),
      })
      .nullable(),
    /** What line and level come to next. */
    crossing: z.object({ title: z.string(), tempC: z.number(), atMs: atMs.nullable() }).nullable(),
    /** Of who made the link. */
    units: unitPreferencesSchema,
    /** Key of this hub for notifications; `null` when it sends none. */
    pushKey: z.string().nullable(),
    /** Hub wall time; the link opens nothing any more from then on. */
    expiresAtMs: atMs,
  })
  .meta({ id: 'FollowedRun' });
export type FollowedRun = z.infer<typeof followedRunSchema>;

const base64Url = (length: number) => z.string().regex(new RegExp(`^[\\w-]{${length}}=*$`), 'This is not a push key.');

/** A subscription as `PushSubscription.toJSON()` gives it. */
export const pushSubscriptionSchema = z
  .strictObject({
    endpoint: z.url({ protocol: /^https$/, error: 'Notifications go through an https address.' }).max(1000),
    /** P-256 point of 65 bytes, and a secret of 16. */
    keys: z.strictObject({ p256dh: base64Url(87), auth: base64Url(22) }),
  })
  .meta({ id: 'PushSubscription' });
export type PushSubscription = z.infer<typeof pushSubscriptionSchema>;

export const endPushSubscriptionSchema = pushSubscriptionSchema
  .pick({ endpoint: true })
  .meta({ id: 'EndPushSubscription' });
export type EndPushSubscription = z.infer<typeof endPushSubscriptionSchema>;

/** What a push carries, encrypted for the phone. */
export interface PushMessage {
  /** A later stage of the same alert takes its place. */
  tag: string;
  stage: z.infer<typeof alertStageSchema>;
  title: string;
  body: string;
  /** Hub wall time. */
  sentAtMs: number;
}
