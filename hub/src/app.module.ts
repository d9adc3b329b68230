import { Module, type DynamicModule } from '@nestjs/common';
import { AlertsModule } from './alerts/alerts.module.js';
import { AuthModule } from './auth/auth.module.js';
import { BatchesModule } from './batches/batches.module.js';
import { CommonModule } from './common/common.module.js';
import { ConfigModule } from './config/config.module.js';
import type { HubConfig } from './config/environment.js';
import { DatabaseModule } from './database/database.module.js';
import { EquipmentModule } from './equipment/equipment.module.js';
import { FollowModule } from './follow/follow.module.js';
import { HealthModule } from './health/health.module.js';
import { HousesModule } from './houses/houses.module.js';
import { MembersModule } from './members/members.module.js';
import { ProbesModule } from './probes/probes.module.js';
import { ReadingsModule } from './readings/readings.module.js';
import { RealtimeModule } from './realtime/realtime.module.js';
import { RecipesModule } from './recipes/recipes.module.js';
import { RehearsalsModule } from './rehearsals/rehearsals.module.js';
import { LearnedModule } from './runs/learned.module.js';
import { RunsModule } from './runs/runs.module.js';
import { StoresModule } from './stores/stores.module.js';

@Module({})
export class AppModule {
  static forRoot(config: HubConfig): DynamicModule {
    return {
      module: AppModule,
      imports: [
        ConfigModule.forRoot(config),
        DatabaseModule,
        CommonModule,
        HealthModule,
        HousesModule,
        MembersModule,
        AuthModule,
        EquipmentModule,
        RecipesModule,
        StoresModule,
        BatchesModule,
        ProbesModule,
        RunsModule,
        ReadingsModule,
        LearnedModule,
        AlertsModule,
        FollowModule,
        RehearsalsModule,
        RealtimeModule,
      ],
    };
  }
}
