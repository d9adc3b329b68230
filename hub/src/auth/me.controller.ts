import { Body, Controller, Get, Patch } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  houseSchema,
  memberSchema,
  unitPreferencesSchema,
  updateReachSchema,
  type House,
  type Member,
  type UpdateReach,
} from '@steepfall/shared/contracts';
import type { UnitPreferences } from '@steepfall/shared/units';
import { z } from 'zod';
import { SignedIn } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { HousesService, presentHouse } from '../houses/houses.service.js';
import { MembersService, presentMember } from '../members/members.service.js';

const meSchema = z.object({ member: memberSchema, house: houseSchema }).meta({ id: 'Me' });

@ApiTags('auth')
@ApiBearerAuth()
@Controller('me')
export class MeController {
  constructor(
    private readonly members: MembersService,
    private readonly houses: HousesService,
  ) {}

  @Get()
  @SignedIn()
  @Answers(meSchema)
  async get(@Actor() actor: Actor): Promise<{ member: Member; house: House }> {
    const [member, house] = await Promise.all([
      this.members.get(actor.houseId, actor.memberId),
      this.houses.get(actor.houseId),
    ]);
    return { member: presentMember(member), house: presentHouse(house) };
  }

  @Patch('units')
  @SignedIn()
  @Answers(memberSchema)
  async setUnits(
    @Actor() actor: Actor,
    @Body({ schema: unitPreferencesSchema }) body: UnitPreferences,
  ): Promise<Member> {
    return presentMember(await this.members.setUnits(actor, body));
  }

  @Patch('reach')
  @SignedIn()
  @Answers(memberSchema)
  async setReach(@Actor() actor: Actor, @Body({ schema: updateReachSchema }) { reachS }: UpdateReach): Promise<Member> {
    return presentMember(await this.members.setReach(actor, reachS));
  }
}
