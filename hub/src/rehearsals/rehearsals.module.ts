import { Module } from '@nestjs/common';
import { EquipmentModule } from '../equipment/equipment.module.js';
import { HousesModule } from '../houses/houses.module.js';
import { ProbesModule } from '../probes/probes.module.js';
import { ReadingsModule } from '../readings/readings.module.js';
import { RecipesModule } from '../recipes/recipes.module.js';
import { RunsModule } from '../runs/runs.module.js';
import { RehearsalsController } from './rehearsals.controller.js';
import { RehearsalsService } from './rehearsals.service.js';

@Module({
  imports: [RunsModule, ReadingsModule, RecipesModule, EquipmentModule, HousesModule, ProbesModule],
  controllers: [RehearsalsController],
  providers: [RehearsalsService],
})
export class RehearsalsModule {}
