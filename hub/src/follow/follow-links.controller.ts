import { networkInterfaces } from 'node:os';
import { Controller, Delete, Get, Param, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  followLinksSchema,
  newFollowLinkSchema,
  type FollowLinks,
  type NewFollowLink,
} from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersNothing } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { HubConfig } from '../config/environment.js';
import { FollowLinksService } from './follow-links.service.js';
import { lanOrigins } from './lan-origins.js';

@ApiTags('follow')
@ApiBearerAuth()
@Controller('runs/:id/follow-links')
export class FollowLinksController {
  constructor(
    private readonly links: FollowLinksService,
    private readonly config: HubConfig,
  ) {}

  @Get()
  @Requires('runs:act')
  @Answers(followLinksSchema)
  async list(@Actor() actor: Actor, @Param('id', { schema: idSchema }) runId: string): Promise<FollowLinks> {
    const { host, port, lan, publicOrigin } = this.config;
    const scheme = lan ? 'https' : 'http';
    return {
      links: await this.links.list(actor.houseId, runId),
      origins: publicOrigin ? [publicOrigin] : lanOrigins({ scheme, host, port }, networkInterfaces()),
    };
  }

  @Post()
  @Requires('runs:act')
  @Answers(newFollowLinkSchema, { status: 201 })
  make(@Actor() actor: Actor, @Param('id', { schema: idSchema }) runId: string): Promise<NewFollowLink> {
    return this.links.make(actor, runId);
  }

  @Delete(':linkId')
  @Requires('runs:act')
  @AnswersNothing()
  revoke(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) runId: string,
    @Param('linkId', { schema: idSchema }) linkId: string,
  ): Promise<void> {
    return this.links.revoke(actor, runId, linkId);
  }
}
