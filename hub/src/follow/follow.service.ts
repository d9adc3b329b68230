import { Injectable } from '@nestjs/common';
import type { FollowedRun } from '@steepfall/shared/contracts';
import { RunSupervisor } from '../alerts/run-supervisor.service.js';
import type { FollowerActor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { MembersService, presentMember } from '../members/members.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import { FollowLinksService } from './follow-links.service.js';
import { followedRun } from './follow-view.js';
import { openUntilMs } from './link-lifetime.js';
import { PushSender } from './push-sender.js';

/** What a phone with a follow link sees. */
@Injectable()
export class FollowService {
  constructor(
    private readonly links: FollowLinksService,
    private readonly logs: RunLogService,
    private readonly supervisor: RunSupervisor,
    private readonly members: MembersService,
    private readonly sender: PushSender,
    private readonly clock: Clock,
  ) {}

  async see(follower: FollowerActor): Promise<FollowedRun> {
    const { houseId, runId } = follower;
    const link = await this.links.get(follower);
    const [log, maker] = await Promise.all([this.logs.get(houseId, runId), this.members.get(houseId, link.createdBy)]);
    const { state, facts } = log;
    return followedRun({
      state,
      live: facts.probeId === null ? null : this.supervisor.viewOf(log),
      units: presentMember(maker).units,
      nowMs: this.clock.nowMs(),
      pushKey: this.sender.publicKey,
      expiresAtMs: openUntilMs(link, state),
    });
  }
}
