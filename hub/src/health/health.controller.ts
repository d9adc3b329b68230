import { setTimeout as sleep } from 'node:timers/promises';
import { Controller, Get, Res } from '@nestjs/common';
import { InjectConnection } from '@nestjs/sequelize';
import { ApiTags } from '@nestjs/swagger';
import { healthSchema, type Health } from '@steepfall/shared/contracts';
import type { Response } from 'express';
import { QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { Public } from '../common/access/access.decorators.js';
import { Clock } from '../common/clock.js';
import { Answers } from '../common/http/answers.decorator.js';
import { hubVersion } from './version.js';

const DATABASE_ANSWERS_WITHIN_MS = 2_000;

@ApiTags('health')
@Controller('health')
export class HealthController {
  constructor(
    @InjectConnection() private readonly sequelize: Sequelize,
    private readonly clock: Clock,
  ) {}

  /** 200 while the database answers, 503 otherwise; the body says which. */
  @Get()
  @Public()
  @Answers(healthSchema)
  async get(@Res({ passthrough: true }) response: Response): Promise<Health> {
    const isUp = await this.isDatabaseUp();
    if (!isUp) response.status(503);
    return {
      status: isUp ? 'ok' : 'degraded',
      database: isUp ? 'up' : 'down',
      version: hubVersion,
      nowMs: this.clock.nowMs(),
    };
  }

  private async isDatabaseUp(): Promise<boolean> {
    const isUp = this.sequelize.query('SELECT 1', { type: QueryTypes.SELECT }).then(
      () => true,
      () => false,
    );
    // A pool without a database answers only after its patience; whoever asks for health wants to know now.
    return Promise.race([isUp, sleep(DATABASE_ANSWERS_WITHIN_MS, false, { ref: false })]);
  }
}
