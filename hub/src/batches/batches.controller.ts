import { Body, Controller, Get, Param, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import { batchSchema, createBatchSchema, type Batch, type CreateBatch } from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { BatchesService } from './batches.service.js';

@ApiTags('batches')
@ApiBearerAuth()
@Controller('batches')
export class BatchesController {
  constructor(private readonly batches: BatchesService) {}

  @Get()
  @Requires('batches:read')
  @AnswersList(batchSchema)
  list(@Actor() actor: Actor): Promise<Batch[]> {
    return this.batches.list(actor.houseId);
  }

  @Post()
  @Requires('batches:manage')
  @Answers(batchSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createBatchSchema }) body: CreateBatch): Promise<Batch> {
    return this.batches.create(actor, body);
  }

  @Get(':id')
  @Requires('batches:read')
  @Answers(batchSchema)
  get(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Batch> {
    return this.batches.get(actor.houseId, id);
  }
}
