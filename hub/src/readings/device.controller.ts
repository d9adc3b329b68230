import { Body, Controller, Get, Post } from '@nestjs/common';
import { ApiBearerAuth, ApiTags } from '@nestjs/swagger';
import {
  pushedReadingsSchema,
  pushReadingsSchema,
  type PushedReadings,
  type PushReadings,
} from '@steepfall/shared/contracts';
import { runClockSchema, type RunClock } from '@steepfall/shared/timers';
import { DeviceOnly } from '../common/access/access.decorators.js';
import { Device, type DeviceActor } from '../common/access/actor.js';
import { Answers } from '../common/http/answers.decorator.js';
import { IngestionService } from './ingestion.service.js';

/** For thermometers: the token of the probe as bearer token. */
@ApiTags('device')
@ApiBearerAuth()
@Controller('device')
@DeviceOnly()
export class DeviceController {
  constructor(private readonly ingestion: IngestionService) {}

  /** Answered after the readings are on disk. Sending the same ones again changes nothing. */
  @Post('readings')
  @Answers(pushedReadingsSchema)
  push(
    @Device() { probeId }: DeviceActor,
    @Body({ schema: pushReadingsSchema }) { readings }: PushReadings,
  ): Promise<PushedReadings> {
    return this.ingestion.ingest(probeId, readings);
  }

  /** The clock to stamp readings with: that of the run the probe belongs to now, or wall time. */
  @Get('clock')
  @Answers(runClockSchema)
  clock(@Device() { probeId }: DeviceActor): RunClock {
    return this.ingestion.clockOf(probeId);
  }
}
