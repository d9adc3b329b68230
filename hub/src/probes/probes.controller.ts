import { Body, Controller, Delete, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  createProbeSchema,
  probeSchema,
  probeWithTokenSchema,
  updateProbeSchema,
  type CreateProbe,
  type Probe,
  type ProbeWithToken,
  type UpdateProbe,
} from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList, AnswersNothing } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { ProbesService } from './probes.service.js';

@ApiTags('probes')
@ApiBearerAuth()
@Controller('probes')
export class ProbesController {
  constructor(private readonly probes: ProbesService) {}

  @Get()
  @Requires('probes:read')
  @AnswersList(probeSchema)
  list(@Actor() actor: Actor): Promise<Probe[]> {
    return this.probes.list(actor.houseId);
  }

  @Post()
  @Requires('probes:manage')
  @Answers(probeWithTokenSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createProbeSchema }) body: CreateProbe): Promise<ProbeWithToken> {
    return this.probes.create(actor, body);
  }

  @Patch(':id')
  @Requires('probes:manage')
  @Answers(probeSchema)
  update(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateProbeSchema }) body: UpdateProbe,
  ): Promise<Probe> {
    return this.probes.update(actor, id, body);
  }

  @Post(':id/token')
  @Requires('probes:manage')
  @Answers(probeWithTokenSchema, { status: 201 })
  rotateToken(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<ProbeWithToken> {
    return this.probes.rotateToken(actor, id);
  }

  @Delete(':id/token')
  @Requires('probes:manage')
  @AnswersNothing()
  revokeToken(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<void> {
    return this.probes.revokeToken(actor, id);
  }
}
