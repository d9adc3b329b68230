import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  probeReadingsQuerySchema,
  probeReadingsSchema,
  type ProbeReadings,
  type ProbeReadingsQuery,
} from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { Answers } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { ProbesService } from '../probes/probes.service.js';
import { ReadingsStore } from './readings.store.js';

/** A test at the desk looks at minutes, never at a day. */
const NEWEST = 2000;

@ApiTags('probes')
@ApiBearerAuth()
@Controller('probes')
export class ProbeReadingsController {
  constructor(
    private readonly probes: ProbesService,
    private readonly store: ReadingsStore,
    private readonly clock: Clock,
  ) {}

  /** The newest readings of a probe, corrected and as it sent them. */
  @Get(':id/readings')
  @Requires('probes:read')
  @Answers(probeReadingsSchema)
  async get(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Query({ schema: probeReadingsQuerySchema }) { fromMs }: ProbeReadingsQuery,
  ): Promise<ProbeReadings> {
    if (!(await this.probes.find(actor.houseId, id))) throw new ProblemError('not-found', 'There is no such probe.');
    const readings = await this.store.newest(id, fromMs, NEWEST);
    return { probeId: id, nowMs: this.clock.nowMs(), readings };
  }
}
