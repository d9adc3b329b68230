import { Injectable, type NestMiddleware } from '@nestjs/common';
import { InjectThrottlerStorage, type ThrottlerStorage } from '@nestjs/throttler';
import { ProblemError } from '@steepfall/shared/problems';
import type { NextFunction, Request, Response } from 'express';

const MINUTE_MS = 60_000;
/** A phone asks thirty times a minute, and a crew of ten may sit behind one router. */
export const MOST_A_MINUTE = 600;

export function countTry(storage: ThrottlerStorage, place: string): ReturnType<ThrottlerStorage['increment']> {
  return storage.increment(`follow ${place}`, MINUTE_MS, MOST_A_MINUTE, MINUTE_MS, 'follow');
}

/** Counts before the token is looked at, so that guesses count too: the guard comes later. */
@Injectable()
export class FollowLimit implements NestMiddleware {
  constructor(@InjectThrottlerStorage() private readonly storage: ThrottlerStorage) {}

  async use(request: Request, _: Response, next: NextFunction): Promise<void> {
    const counted = await countTry(this.storage, request.ip ?? '');
    if (!counted.isBlocked) return next();
    const waitS = Math.max(1, Math.ceil(counted.timeToBlockExpire));
    next(new ProblemError('too-many-tries', `Wait ${waitS} seconds, then try again.`));
  }
}
