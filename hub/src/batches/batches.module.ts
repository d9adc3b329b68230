import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { AuditModule } from '../audit/audit.module.js';
import { EquipmentModule } from '../equipment/equipment.module.js';
import { HousesModule } from '../houses/houses.module.js';
import { ProbesModule } from '../probes/probes.module.js';
import { RecipesModule } from '../recipes/recipes.module.js';
import { RunSummariesModule } from '../runs/run-summaries.module.js';
import { StoresModule } from '../stores/stores.module.js';
import { BatchesController } from './batches.controller.js';
import { BatchesService } from './batches.service.js';
import { Batch } from './models/batch.model.js';

@Module({
  imports: [
    SequelizeModule.forFeature([Batch]),
    HousesModule,
    RecipesModule,
    EquipmentModule,
    ProbesModule,
    RunSummariesModule,
    StoresModule,
    AuditModule,
  ],
  controllers: [BatchesController],
  providers: [BatchesService],
  exports: [BatchesService],
})
export class BatchesModule {}
