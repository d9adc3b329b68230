import { Injectable } from '@nestjs/common';
import { PROTOCOL_VERSION } from '@steepfall/shared/contracts';
import { ProblemError, type Problem } from '@steepfall/shared/problems';
import { z } from 'zod';
import type { SocketIdentity } from '../common/access/actor.js';
import { problemOf } from '../common/errors/problem-of.js';
import { ProbesService } from '../probes/probes.service.js';
import { AccessTokensService } from '../sessions/access-tokens.service.js';

const handshakeSchema = z.union([
  z.object({ accessToken: z.string().min(1).max(4000), protocol: z.number() }),
  z.object({ deviceToken: z.string().min(1).max(200) }),
]);

/** Who is at the other end of a new socket. No guard runs on a handshake, so this is the gate. */
@Injectable()
export class Handshake {
  constructor(
    private readonly accessTokens: AccessTokensService,
    private readonly probes: ProbesService,
  ) {}

  /** Throws a problem; never lets anybody in without an identity. */
  async identify(auth: unknown): Promise<SocketIdentity> {
    const handshake = handshakeSchema.safeParse(auth);
    if (!handshake.success) throw new ProblemError('not-signed-in', 'Connect with an access token or a device token.');
    if ('deviceToken' in handshake.data) {
      const device = await this.probes.authenticate(handshake.data.deviceToken);
      if (!device) throw new ProblemError('device-token-unknown', 'Make a new token for this probe.');
      return { device };
    }
    const { accessToken, protocol } = handshake.data;
    if (protocol !== PROTOCOL_VERSION)
      throw new ProblemError('not-valid', 'This page and the hub are of different versions. Load the page again.', {
        errors: [{ pointer: '/protocol', detail: `The hub speaks version ${PROTOCOL_VERSION}.` }],
      });
    return { actor: await this.accessTokens.verifyAccessToken(accessToken) };
  }
}

/** What the client finds in `connect_error`: the problem hangs on `data`. */
export class HandshakeRefusedError extends Error {
  readonly data: { problem: Problem };

  constructor(cause: unknown) {
    const { problem } = problemOf(cause);
    super(problem.title);
    this.data = { problem };
  }
}
