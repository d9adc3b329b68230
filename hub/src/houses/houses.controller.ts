import { Body, Controller, Get, Patch } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import { houseSchema, updateHouseSchema, type House, type UpdateHouse } from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { HousesService, presentHouse } from './houses.service.js';

@ApiTags('house')
@ApiBearerAuth()
@Controller('house')
export class HousesController {
  constructor(private readonly houses: HousesService) {}

  @Get()
  @Requires('house:read')
  @Answers(houseSchema)
  async get(@Actor() actor: Actor): Promise<House> {
    return presentHouse(await this.houses.get(actor.houseId));
  }

  @Patch()
  @Requires('house:manage')
  @Answers(houseSchema)
  async update(@Actor() actor: Actor, @Body({ schema: updateHouseSchema }) body: UpdateHouse): Promise<House> {
    return presentHouse(await this.houses.update(actor, body));
  }
}
