import { Module } from '@nestjs/common';
import { ReadingsModule } from '../readings/readings.module.js';
import { RunsModule } from '../runs/runs.module.js';
import { RunSupervisor } from './run-supervisor.service.js';
import { SilentTablets } from './silent-tablets.service.js';

@Module({ imports: [RunsModule, ReadingsModule], providers: [RunSupervisor, SilentTablets], exports: [RunSupervisor] })
export class AlertsModule {}
