import { Injectable } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { Transaction } from 'sequelize';
import type { Actor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { AuditEntry } from './models/audit-entry.model.js';

export interface AuditedAct {
  houseId: string;
  /** `null`: the hub itself. */
  memberId: string | null;
  /** Past tense, dotted: `member.added`. */
  action: string;
  /** The id of what was changed. */
  subject: string;
  facts?: Record<string, unknown>;
}

/** Who changed what outside of runs (a run has its own log). Entries are written once and never changed. */
@Injectable()
export class AuditService {
  constructor(
    @InjectModel(AuditEntry) private readonly entries: typeof AuditEntry,
    private readonly clock: Clock,
  ) {}

  /** What a signed-in member did. */
  recordAct(
    { houseId, memberId }: Pick<Actor, 'houseId' | 'memberId'>,
    action: string,
    subject: string,
    facts: Record<string, unknown>,
    transaction: Transaction,
  ): Promise<void> {
    return this.record({ houseId, memberId, action, subject, facts }, transaction);
  }

  async record(act: AuditedAct, transaction?: Transaction): Promise<void> {
    await this.entries.create({ ...act, facts: act.facts ?? {}, atMs: this.clock.nowMs() }, { transaction });
  }
}
