import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  runReadingsQuerySchema,
  runReadingsSchema,
  type RunReadings,
  type RunReadingsQuery,
} from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { RunReadingsService } from './run-readings.service.js';

@ApiTags('runs')
@ApiBearerAuth()
@Controller('runs')
export class RunReadingsController {
  constructor(private readonly readings: RunReadingsService) {}

  @Get(':id/readings')
  @Requires('runs:read')
  @Answers(runReadingsSchema)
  get(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Query({ schema: runReadingsQuerySchema }) query: RunReadingsQuery,
  ): Promise<RunReadings> {
    return this.readings.get(actor.houseId, id, query);
  }
}
