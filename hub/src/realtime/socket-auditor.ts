import { Injectable } from '@nestjs/common';
import type { SocketIdentity } from '../common/access/actor.js';
import { MembersService } from '../members/members.service.js';
import { ProbesService } from '../probes/probes.service.js';
import { SessionsService } from '../sessions/sessions.service.js';

/**
 * Looks again at who is connected. A socket outlives its access token, so what the token vouched for must still be true: the session
 * goes on, the member is in the house with the same role, the token of the probe holds.
 */
@Injectable()
export class SocketAuditor {
  constructor(
    private readonly sessions: SessionsService,
    private readonly members: MembersService,
    private readonly probes: ProbesService,
  ) {}

  /** Those that must go. */
  async outdated<Connected extends { data: SocketIdentity }>(sockets: readonly Connected[]): Promise<Connected[]> {
    const actors = sockets.flatMap(({ data }) => data.actor ?? []);
    const devices = sockets.flatMap(({ data }) => data.device ?? []);
    const [openSessions, roles, trusted] = await Promise.all([
      this.sessions.openAmong(unique(actors.map(({ sessionId }) => sessionId))),
      this.members.rolesOf(unique(actors.map(({ memberId }) => memberId))),
      this.probes.stillTrusted(unique(devices.map(({ probeId }) => probeId))),
    ]);
    return sockets.filter(({ data: { actor, device } }) => {
      if (actor) return !openSessions.has(actor.sessionId) || roles.get(actor.memberId) !== actor.role;
      return !device || !trusted.has(device.probeId);
    });
  }
}

function unique(values: string[]): string[] {
  return [...new Set(values)];
}
