import { Injectable, type OnApplicationBootstrap } from '@nestjs/common';
import { JwtService } from '@nestjs/jwt';
import { roleSchema } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { z } from 'zod';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { SessionsService } from './sessions.service.js';

export const ACCESS_LIFETIME_S = 10 * 60;

/** The claims of an access token. Names are short because they travel with every request. */
const claimsSchema = z.object({
  sub: z.uuid(),
  mid: z.uuid(),
  hid: z.uuid(),
  role: roleSchema,
  sid: z.uuid(),
  exp: z.number(),
});

/** Access tokens: short-lived, checked without the database. */
@Injectable()
export class AccessTokensService implements OnApplicationBootstrap {
  /** Sessions that ended while tokens of theirs were still running, with the end of the last of those tokens. */
  private readonly endedSessions = new Map<string, number>();

  constructor(
    private readonly jwt: JwtService,
    private readonly clock: Clock,
    private readonly sessions: SessionsService,
  ) {
    sessions.ended$.subscribe(({ sessionId }) => this.block(sessionId));
  }

  /** A restart does not give back what was taken: tokens of sessions that ended lately are still running. */
  async onApplicationBootstrap(): Promise<void> {
    const sinceMs = this.clock.nowMs() - ACCESS_LIFETIME_S * 1000;
    for (const sessionId of await this.sessions.endedSince(sinceMs)) this.block(sessionId);
  }

  async sign(actor: Omit<Actor, 'expiresAtMs'>): Promise<{ accessToken: string; expiresAtMs: number }> {
    const issuedAtS = Math.floor(this.clock.nowMs() / 1000);
    const exp = issuedAtS + ACCESS_LIFETIME_S;
    const claims = { mid: actor.memberId, hid: actor.houseId, role: actor.role, sid: actor.sessionId };
    const accessToken = await this.jwt.signAsync({ ...claims, sub: actor.userId, iat: issuedAtS, exp });
    return { accessToken, expiresAtMs: exp * 1000 };
  }

  /** Who an access token speaks for. Throws a problem when it is false, expired, or its session has ended. */
  async verifyAccessToken(accessToken: string): Promise<Actor> {
    let claims: unknown;
    try {
      claims = await this.jwt.verifyAsync<Record<string, unknown>>(accessToken);
    } catch (error) {
      const isExpired = error instanceof Error && error.name === 'TokenExpiredError';
      throw isExpired
        ? new ProblemError('session-expired', 'Refresh the session and try again.')
        : new ProblemError('not-signed-in', 'Sign in first.');
    }
    return this.actorOf(claims);
  }

  /** Reads claims whose signature and end have been checked. */
  actorOf(claims: unknown): Actor {
    const result = claimsSchema.safeParse(claims);
    if (!result.success) throw new ProblemError('not-signed-in', 'Sign in first.');
    const { sub, mid, hid, role, sid, exp } = result.data;
    if (this.endedSessions.has(sid)) throw new ProblemError('session-expired', 'Sign in again.');
    return { userId: sub, memberId: mid, houseId: hid, role, sessionId: sid, expiresAtMs: exp * 1000 };
  }

  private block(sessionId: string): void {
    const nowMs = this.clock.nowMs();
    for (const [id, untilMs] of this.endedSessions) if (untilMs < nowMs) this.endedSessions.delete(id);
    this.endedSessions.set(sessionId, nowMs + ACCESS_LIFETIME_S * 1000);
  }
}
