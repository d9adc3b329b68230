import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditModule } from '../audit/audit.module.js';
import { DeviceAuthenticator } from '../common/access/device-authenticator.js';
import { Probe } from './models/probe.model.js';
import { ProbesController } from './probes.controller.js';
import { ProbesService } from './probes.service.js';

@Module({
  imports: [SequelizeModule.forFeature([Probe]), AuditModule],
  controllers: [ProbesController],
  providers: [ProbesService, { provide: DeviceAuthenticator, useExisting: ProbesService }],
  exports: [ProbesService],
})
export class ProbesModule {}
