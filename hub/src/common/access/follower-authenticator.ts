import type { FollowerActor } from './actor.js';

/** Who knows the tokens of follow links. The guard asks for it by this class; the follow feature provides it. */
export abstract class FollowerAuthenticator {
  /** What this token opens; `null` when it is unknown. Throws `follow-link-over` when it opens nothing any more. */
  abstract authenticate(followToken: string): Promise<FollowerActor | null>;
}
