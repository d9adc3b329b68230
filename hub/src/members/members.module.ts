import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditModule } from '../audit/audit.module.js';
import { SessionsModule } from '../sessions/sessions.module.js';
import { MembersController } from './members.controller.js';
import { MembersService } from './members.service.js';
import { Membership } from './models/membership.model.js';
import { User } from './models/user.model.js';

@Module({
  imports: [SequelizeModule.forFeature([Membership, User]), SessionsModule, AuditModule],
  controllers: [MembersController],
  providers: [MembersService],
  exports: [MembersService],
})
export class MembersModule {}
