import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditService } from './audit.service.js';
import { AuditEntry } from './models/audit-entry.model.js';

@Module({ imports: [SequelizeModule.forFeature([AuditEntry])], providers: [AuditService], exports: [AuditService] })
export class AuditModule {}
