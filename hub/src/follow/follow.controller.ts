import { Body, Controller, Delete, Get, Post, Req } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import {
  endPushSubscriptionSchema,
  followedRunSchema,
  pushSubscriptionSchema,
  type EndPushSubscription,
  type FollowedRun,
  type PushSubscription,
} from '@steepfall/shared/contracts';
import type { Request } from 'express';
import { FollowerOnly } from '../common/access/access.decorators.js';
import { Follower, type FollowerActor } from '../common/access/actor.js';
import { Answers, AnswersNothing } from '../common/http/answers.decorator.js';
import { FollowService } from './follow.service.js';
import { PushService } from './push.service.js';

/** For phones, with `Authorization: Follow <token>`. */
@ApiTags('follow')
@Controller('follow')
export class FollowController {
  constructor(
    private readonly follow: FollowService,
    private readonly push: PushService,
  ) {}

  @Get()
  @FollowerOnly()
  @Answers(followedRunSchema)
  see(@Follower() follower: FollowerActor): Promise<FollowedRun> {
    return this.follow.see(follower);
  }

  @Post('subscriptions')
  @FollowerOnly()
  @AnswersNothing()
  subscribe(
    @Follower() follower: FollowerActor,
    @Req() request: Request,
    @Body({ schema: pushSubscriptionSchema }) subscription: PushSubscription,
  ): Promise<void> {
    return this.push.subscribe(follower, subscription, contactOf(request));
  }

  @Delete('subscriptions')
  @FollowerOnly()
  @AnswersNothing()
  unsubscribe(
    @Follower() follower: FollowerActor,
    @Body({ schema: endPushSubscriptionSchema }) { endpoint }: EndPushSubscription,
  ): Promise<void> {
    return this.push.unsubscribe(follower, endpoint);
  }
}

/** Push services want to know whom to turn to; without a contact of its own the hub names the address of the page. */
function contactOf(request: Request): string {
  const { origin, host = 'localhost' } = request.headers;
  const hostname = URL.canParse(origin ?? '') ? new URL(origin ?? '').hostname : host.replace(/:\d+$/, '');
  return `https://${hostname.slice(0, 250)}`;
}
