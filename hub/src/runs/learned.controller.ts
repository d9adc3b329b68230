import { Controller, Get, Param } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import { runLearnedSchema, type RunLearned } from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { LearnedService } from './learned.service.js';

@ApiTags('runs')
@ApiBearerAuth()
@Controller('runs')
export class LearnedController {
  constructor(private readonly learned: LearnedService) {}

  @Get(':id/learned')
  @Requires('batches:read')
  @Answers(runLearnedSchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<RunLearned> {
    return this.learned.get(actor.houseId, id);
  }
}
