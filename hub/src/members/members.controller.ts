import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  createMemberSchema,
  memberSchema,
  updateMemberSchema,
  type CreateMember,
  type Member,
  type UpdateMember,
} from '@steepfall/shared/contracts';
import { Requires } from '../common/access/access.decorators.js';
import { Actor } from '../common/access/actor.js';
import { Answers, AnswersList } from '../common/http/answers.decorator.js';
import { idSchema } from '../common/http/id-param.js';
import { MembersService, presentMember } from './members.service.js';

@ApiTags('members')
@ApiBearerAuth()
@Controller('members')
export class MembersController {
  constructor(private readonly members: MembersService) {}

  @Get()
  @Requires('members:read')
  @AnswersList(memberSchema)
  async list(@Actor() actor: Actor): Promise<Member[]> {
    return (await this.members.list(actor.houseId)).map(presentMember);
  }

  @Post()
  @Requires('members:manage')
  @Answers(memberSchema, { status: 201 })
  async create(@Actor() actor: Actor, @Body({ schema: createMemberSchema }) body: CreateMember): Promise<Member> {
    return presentMember(await this.members.create(actor, body));
  }

  @Patch(':id')
  @Requires('members:manage')
  @Answers(memberSchema)
  async update(
    @Actor() actor: Actor,
    @Param('id', { schema: idSchema }) id: string,
    @Body({ schema: updateMemberSchema }) body: UpdateMember,
  ): Promise<Member> {
    return presentMember(await this.members.update(actor, id, body));
  }
}
