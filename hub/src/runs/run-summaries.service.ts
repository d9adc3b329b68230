import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { RunSummary } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Transaction } from 'sequelize';
import { inHouse } from '../common/house-scope/in-house.js';
import { Run } from './models/run.model.js';

/** More than anybody scrolls through; older ones are found through their batch. */
const LONGEST_LIST = 200;

export function presentRun(run: Run): RunSummary {
  return {
    id: run.id,
    title: run.title,
    batchId: run.batchId,
    batchNumber: run.batchNumber,
    isRehearsal: run.isRehearsal,
    status: run.status,
    outcome: run.outcome,
    probeId: run.probeId,
    probeLagS: run.probeLagS,
    probeLagErrorRatio: run.probeLagErrorRatio ?? null,
    probeResolutionC: run.probeResolutionC,
    probeSamplePeriodS: run.probeSamplePeriodS,
    roomC: run.roomC,
    coolantC: run.coolantC,
    chillerPerS: run.chillerPerS ?? null,
    startedAtMs: run.startedAtMs,
    endedAtMs: run.endedAtMs,
    clock: { anchorWallMs: run.clockAnchorWallMs, anchorRunMs: run.clockAnchorRunMs, rate: run.clockRate },
    lastSeq: run.lastSeq,
    currentStepTitle: run.currentStepTitle,
    alertStage: run.alertStage,
  };
}

/** Runs as lists show them. Knows nothing of logs and batches, so that batches can show their runs. */
@Injectable()
export class RunSummariesService {
  constructor(@InjectModel(Run) private readonly runs: typeof Run) {}

  /** The newest first. */
  async list(houseId: string, status?: RunSummary['status']): Promise<RunSummary[]> {
    const rows = await inHouse(this.runs, houseId).findAll(status ? { status } : {}, {
      order: [['createdAtMs', 'DESC']],
      limit: LONGEST_LIST,
    });
    return rows.map(presentRun);
  }

  async get(houseId: string, id: string): Promise<RunSummary> {
    return presentRun(await this.getRow(houseId, id));
  }

  /** A run of another house is as unknown as one that never was. */
  async getRow(houseId: string, id: string): Promise<Run> {
    const row = await inHouse(this.runs, houseId).find(id);
    if (!row) throw new ProblemError('run-not-found', 'There is no such run in this house.');
    return row;
  }

  /** The run that counts for each batch: the open one, else the newest. */
  async ofBatches(houseId: string, batchIds: string[], transaction?: Transaction): Promise<Map<string, RunSummary>> {
    const rows = await inHouse(this.runs, houseId).findAll(
      { batchId: batchIds },
      { order: [['createdAtMs', 'ASC']], transaction },
    );
    const found = new Map<string, RunSummary>();
    for (const row of rows) {
      const { batchId } = row;
      if (batchId === null || found.get(batchId)?.status === 'running') continue;
      found.set(batchId, presentRun(row));
    }
    return found;
  }
}
