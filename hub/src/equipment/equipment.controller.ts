import { Body, Controller, Delete, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  createEquipmentSchema,
  equipmentSchema,
  updateEquipmentSchema,
  type CreateEquipment,
  type Equipment,
  type UpdateEquipment,
} from '@steepfall/shared/contracts';
import { z } from 'zod';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList, AnswersNothing } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { EquipmentService } from './equipment.service.js';

const listQuerySchema = z.strictObject({ removed: z.stringbool().default(false) });

@ApiTags('equipment')
@ApiBearerAuth()
@Controller('equipment')
export class EquipmentController {
  constructor(private readonly equipment: EquipmentService) {}

  @Get()
  @Requires('equipment:read')
  @AnswersList(equipmentSchema)
  list(
    @Actor() actor: Actor,
    @Query({ schema: listQuerySchema }) { removed }: z.infer<typeof listQuerySchema>,
  ): Promise<Equipment[]> {
    return this.equipment.list(actor.houseId, { isRemoved: removed });
  }

  @Post()
  @Requires('equipment:manage')
  @Answers(equipmentSchema, { status: 201 })
  create(@Actor() actor: Actor, @Body({ schema: createEquipmentSchema }) body: CreateEquipment): Promise<Equipment> {
    return this.equipment.create(actor, body);
  }

  @Patch(':id')
  @Requires('equipment:manage')
  @Answers(equipmentSchema)
  update(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateEquipmentSchema }) body: UpdateEquipment,
  ): Promise<Equipment> {
    return this.equipment.update(actor, id, body);
  }

  @Delete(':id')
  @Requires('equipment:manage')
  @AnswersNothing()
  remove(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<void> {
    return this.equipment.remove(actor, id);
  }

  @Post(':id/restore')
  @Requires('equipment:manage')
  @Answers(equipmentSchema)
  restore(@Actor() actor: Actor, @Param('id', { schema: idSchema }) id: string): Promise<Equipment> {
    return this.equipment.restore(actor, id);
  }
}
