import { Body, Controller, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  runSummarySchema,
  startRehearsalSchema,
  type RunSummary,
  type StartRehearsal,
} from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { RehearsalsService } from './rehearsals.service.js';

@ApiTags('rehearsals')
@ApiBearerAuth()
@Controller('rehearsals')
export class RehearsalsController {
  constructor(private readonly rehearsals: RehearsalsService) {}

  @Post()
  @Requires('rehearsals:start')
  @Answers(runSummarySchema, { status: 201 })
  start(@Actor() actor: Actor, @Body({ schema: startRehearsalSchema }) body: StartRehearsal): Promise<RunSummary> {
    return this.rehearsals.start(actor, body);
  }
}
