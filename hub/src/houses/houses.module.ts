import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditModule } from '../audit/audit.module.js';
import { HousesController } from './houses.controller.js';
import { HousesService } from './houses.service.js';
import { House } from './models/house.model.js';

@Module({
  imports: [SequelizeModule.forFeature([House]), AuditModule],
  controllers: [HousesController],
  providers: [HousesService],
  exports: [HousesService],
})
export class HousesModule {}
