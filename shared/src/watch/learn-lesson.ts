/** What was learned, and its error: nine times of ten the truth lies within it. */
export interface Learned {
  value: number;
  error: number;
}

/**
 * Why nothing was learned. `no-readings`: none that are good. `few-changes`: nothing was done that moves the probe, or too close together.
 * `too-short`: it never lasted long enough. `unclear`: the answer is less sure than what is told. `far-from-told`: it is so far off that
 * something else must be wrong. `not-told`: what has to be known for it was never told.
 */
export type LessonGap = 'no-readings' | 'few-changes' | 'too-short' | 'unclear' | 'far-from-told' | 'not-told';

export type Lesson = { learned: Learned; because: null } | { learned: null; because: LessonGap };

export function tooLittle(because: LessonGap): Lesson {
  return { learned: null, because };
}
