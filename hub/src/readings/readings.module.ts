import { Module } from '@nestjs/common';
import { ProbesModule } from '../probes/probes.module.js';
import { RunsModule } from '../runs/runs.module.js';
import { DeviceController } from './device.controller.js';
import { IngestionService } from './ingestion.service.js';
import { ProbeReadingsController } from './probe-readings.controller.js';
import { ReadingsStore } from './readings.store.js';
import { RunReadingsController } from './run-readings.controller.js';
import { RunReadingsService } from './run-readings.service.js';

@Module({
  imports: [RunsModule, ProbesModule],
  controllers: [DeviceController, RunReadingsController, ProbeReadingsController],
  providers: [ReadingsStore, IngestionService, RunReadingsService],
  exports: [IngestionService, RunReadingsService],
})
export class ReadingsModule {}
