import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { BatchesModule } from '../batches/batches.module.js';
import { MembersModule } from '../members/members.module.js';
import { ProbesModule } from '../probes/probes.module.js';
import { RunEventRow } from './models/run-event.model.js';
import { Run } from './models/run.model.js';
import { RunLogService } from './run-log.service.js';
import { RunPresence } from './run-presence.service.js';
import { RunSummariesModule } from './run-summaries.module.js';
import { RunsController } from './runs.controller.js';
import { RunsService } from './runs.service.js';

@Module({
  imports: [
    SequelizeModule.forFeature([Run, RunEventRow]),
    RunSummariesModule,
    BatchesModule,
    MembersModule,
    ProbesModule,
  ],
  controllers: [RunsController],
  providers: [RunLogService, RunPresence, RunsService],
  exports: [RunLogService, RunPresence, RunsService, RunSummariesModule],
})
export class RunsModule {}
