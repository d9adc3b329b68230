import { Module } from '@nestjs/common';
import { SequelizeModule } from '@nestjs/sequelize';
import { Run } from './models/run.model.js';
import { RunSummariesService } from './run-summaries.service.js';

@Module({
  imports: [SequelizeModule.forFeature([Run])],
  providers: [RunSummariesService],
  exports: [RunSummariesService],
})
export class RunSummariesModule {}
