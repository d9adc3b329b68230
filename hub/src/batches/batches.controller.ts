import { Body, Controller, Delete, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  batchPlanSchema,
  batchSchema,
  createBatchSchema,
  updateBatchSheetSchema,
  type Batch,
  type BatchPlan,
  type UpdateBatchSheet,
} from '@steepfall/shared/contracts';
import { z } from 'zod';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList, AnswersNothing } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { BatchesService, type BatchValues } from './batches.service.js';

const listQuerySchema = z.strictObject({ cancelled: z.stringbool().default(false) });

@ApiTags('batches')
@ApiBearerAuth()
@Controller('batches')
export class BatchesController {
  constructor(private readonly batches: BatchesService) {}

  @Get()
  @Requires('batches:read')
  @AnswersList(batchSchema)
  list(
    @Actor() actor: Actor,
    @Query({ schema: listQuerySchema }) query: z.infer<typeof listQuerySchema>,
  ): Promise<Batch[]> {
    return this.batches.list(actor.houseId, query);
  }

  @Post()
  @Requires('batches:manage')
  @Answers(batchSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createBatchSchema }) body: BatchValues): Promise<Batch> {
    return this.batches.create(actor, body);
  }

  @Get(':id')
  @Requires('batches:read')
  @Answers(batchSchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Batch> {
    return this.batches.get(actor.houseId, id);
  }

  @Get(':id/plan')
  @Requires('batches:read')
  @Answers(batchPlanSchema)
  plan(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<BatchPlan> {
    return this.batches.plan(actor.houseId, id);
  }

  @Patch(':id/sheet')
  @Requires('batches:manage')
  @Answers(batchPlanSchema)
  updateSheet(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateBatchSheetSchema }) body: UpdateBatchSheet,
  ): Promise<BatchPlan> {
    return this.batches.updateSheet(actor, id, body);
  }

  @Delete(':id')
  @Requires('batches:manage')
  @AnswersNothing()
  cancel(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<void> {
    return this.batches.cancel(actor, id);
  }

  @Post(':id/restore')
  @Requires('batches:manage')
  @Answers(batchSchema)
  restore(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Batch> {
    return this.batches.restore(actor, id);
  }
}
