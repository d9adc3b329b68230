import { Injectable, type ExecutionContext } from '@nestjs/common';
import { ThrottlerGuard, type ThrottlerLimitDetail, type ThrottlerModuleOptions } from '@nestjs/throttler';
import { ProblemError } from '@steepfall/shared/problems';
import type { Request } from 'express';

interface SignInRequest extends Request {
  body: { email?: unknown } | undefined;
}

/**
 * Tries a minute. One address from one place: slow enough against guessing, generous to wet fingers. One place: many people may sit
 * behind one router.
 */
export const signInLimits: ThrottlerModuleOptions = [
  {
    name: 'account',
    ttl: 60_000,
    limit: 20,
    setHeaders: false,
    getTracker: (request: Record<string, unknown>) => {
      const { ip, body } = request as unknown as SignInRequest;
      return `${ip} ${String(body?.email ?? '')
        .toLowerCase()
        .slice(0, 190)}`;
    },
  },
  { name: 'place', ttl: 60_000, limit: 200, setHeaders: false },
];

@Injectable()
export class SignInThrottler extends ThrottlerGuard {
  protected override throwThrottlingException(_: ExecutionContext, limit: ThrottlerLimitDetail): Promise<void> {
    const waitS = Math.max(1, Math.ceil(limit.timeToBlockExpire));
    throw new ProblemError('too-many-tries', `Wait ${waitS} seconds, then try again.`);
  }
}
