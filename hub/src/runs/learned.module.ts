import { Module } from '@nestjs/common';
import { MembersModule } from '../members/members.module.js';
import { ReadingsModule } from '../readings/readings.module.js';
import { LearnedController } from './learned.controller.js';
import { LearnedService } from './learned.service.js';
import { RunsModule } from './runs.module.js';

@Module({
  imports: [RunsModule, ReadingsModule, MembersModule],
  controllers: [LearnedController],
  providers: [LearnedService],
})
export class LearnedModule {}
