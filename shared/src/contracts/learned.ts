import { z } from 'zod';
import { LONGEST_REACH_S, SHORTEST_REACH_S } from '../watch/index.js';

const id = z.uuid();

/** What was learned and its error, nine times of ten; or why it is too little to say. */
const lessonSchema = z.object({
  /** What the run was started with; null where nothing was told. */
  told: z.number().nullable(),
  learned: z.object({ value: z.number(), error: z.number() }).nullable(),
  because: z.enum(['no-readings', 'few-changes', 'too-short', 'unclear', 'far-from-told', 'not-told']).nullable(),
});
export type LessonAnswer = z.infer<typeof lessonSchema>;

export const reachLessonSchema = z.object({
  memberId: id,
  displayName: z.string(),
  /** What the ladder is told of this person now; null: the usual. */
  toldS: z.number().nullable(),
  /** null: too little to say. */
  reachS: z.int().nullable(),
  spreadS: z.number().nullable(),
  answeredCount: z.int(),
  missedCount: z.int(),
});
export type ReachLesson = z.infer<typeof reachLessonSchema>;

/** `GET runs/:id/learned`: what a run that is over teaches. Nothing of it is saved by itself. */
export const runLearnedSchema = z
  .object({
    runId: id,
    /** A simulated kettle: it teaches nothing about the real one. */
    isRehearsal: z.boolean(),
    lagS: lessonSchema,
    coolingPerS: lessonSchema,
    chillingPerS: lessonSchema,
    heaterEfficiency: lessonSchema,
    /** Of those who answered a call in this run, from their last ten calls up to it. */
    reach: z.array(reachLessonSchema),
  })
  .meta({ id: 'RunLearned' });
export type RunLearned = z.infer<typeof runLearnedSchema>;

/** `PATCH me/reach`; null goes back to the usual. */
export const updateReachSchema = z
  .strictObject({
    reachS: z
      .int('Whole seconds.')
      .min(SHORTEST_REACH_S, `At least ${SHORTEST_REACH_S} s.`)
      .max(LONGEST_REACH_S, `At most ${LONGEST_REACH_S} s.`)
      .nullable(),
  })
  .meta({ id: 'UpdateReach' });
export type UpdateReach = z.infer<typeof updateReachSchema>;
