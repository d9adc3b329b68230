import { Body, Controller, Get, Param, Post, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  appendedEventsSchema,
  runSummarySchema,
  type AppendedEvents,
  type RunEvents,
  type RunSummary,
} from '@steepfall/shared/contracts';
import { storedRunEventSchema } from '@steepfall/shared/runs';
import { z } from 'zod';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { RunLogService } from './run-log.service.js';
import { RunSummariesService } from './run-summaries.service.js';
import { RunsService } from './runs.service.js';
import { sentEventsSchema, type SentEvents } from './sent-events.schema.js';

const listQuerySchema = z.strictObject({ status: z.enum(['running', 'ended']).optional() });
const eventsQuerySchema = z.strictObject({ afterSeq: z.coerce.number().int().nonnegative().default(0) });

/** An event that a newer build wrote is told as it is: it is for others to read. */
const newerEventSchema = z.looseObject({ id: z.uuid(), type: z.string(), seq: z.int() });
const eventsAnswerSchema = z.object({
  runId: z.uuid(),
  events: z.array(z.union([storedRunEventSchema, newerEventSchema])),
});

@ApiTags('runs')
@ApiBearerAuth()
@Controller()
export class RunsController {
  constructor(
    private readonly runs: RunsService,
    private readonly summaries: RunSummariesService,
    private readonly logs: RunLogService,
  ) {}

  @Post('batches/:id/runs')
  @Requires('runs:act')
  @Answers(runSummarySchema, { status: 201 })
  start(@Actor() actor: Actor, @Param('id', { schema: idSchema }) batchId: string): Promise<RunSummary> {
    return this.runs.startBatch(actor, batchId);
  }

  @Get('runs')
  @Requires('runs:read')
  @AnswersList(runSummarySchema)
  list(
    @Actor() actor: Actor,
    @Query({ schema: listQuerySchema }) { status }: z.infer<typeof listQuerySchema>,
  ): Promise<RunSummary[]> {
    return this.summaries.list(actor.houseId, status);
  }

  @Get('runs/:id')
  @Requires('runs:read')
  @Answers(runSummarySchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<RunSummary> {
    return this.summaries.get(actor.houseId, id);
  }

  @Get('runs/:id/events')
  @Requires('runs:read')
  @Answers(eventsAnswerSchema)
  async events(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Query({ schema: eventsQuerySchema }) { afterSeq }: z.infer<typeof eventsQuerySchema>,
  ): Promise<RunEvents> {
    const log = await this.logs.get(actor.houseId, id);
    return { runId: id, events: log.eventsAfter(afterSeq) };
  }

  /** Idempotent: send again what was not acknowledged. Each event is taken or refused by itself. */
  @Post('runs/:id/events')
  @Requires('runs:act')
  @Answers(appendedEventsSchema)
  append(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: sentEventsSchema }) { events }: SentEvents,
  ): Promise<AppendedEvents> {
    return this.logs.append(actor.houseId, id, events, actor.memberId);
  }
}
