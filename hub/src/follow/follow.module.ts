import { Module, type MiddlewareConsumer, type NestModule } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AlertsModule } from '../alerts/alerts.module.js';
import { AuditModule } from '../audit/audit.module.js';
import { FollowerAuthenticator } from '../common/access/follower-authenticator.js';
import { MembersModule } from '../members/members.module.js';
import { RunsModule } from '../runs/runs.module.js';
import { FollowLimit } from './follow-limit.js';
import { FollowLinksController } from './follow-links.controller.js';
import { FollowLinksService } from './follow-links.service.js';
import { FollowController } from './follow.controller.js';
import { FollowService } from './follow.service.js';
import { FollowLink } from './models/follow-link.model.js';
import { PushSubscriber } from './models/push-subscriber.model.js';
import { PushSender, WebPushSender } from './push-sender.js';
import { PushService } from './push.service.js';

/** A run followed on a phone: links, what they show, and notifications. */
@Module({
  imports: [
    SequelizeModule.forFeature([FollowLink, PushSubscriber]),
    AlertsModule,
    AuditModule,
    MembersModule,
    RunsModule,
  ],
  controllers: [FollowLinksController, FollowController],
  providers: [
    FollowLinksService,
    { provide: FollowerAuthenticator, useExisting: FollowLinksService },
    FollowService,
    PushService,
    { provide: PushSender, useClass: WebPushSender },
  ],
})
export class FollowModule implements NestModule {
  configure(consumer: MiddlewareConsumer): void {
    consumer.apply(FollowLimit).forRoutes(FollowController);
  }
}
