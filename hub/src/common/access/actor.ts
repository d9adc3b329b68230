import { createParamDecorator, type ExecutionContext } from '@nestjs/common';
import type { Role } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';

/** Who is asking: a member of a house, signed in. */
export interface Actor {
  memberId: string;
  userId: string;
  houseId: string;
  role: Role;
  sessionId: string;
  /** Until when the access token vouches for this. */
  expiresAtMs: number;
}

/** A probe that showed its token. */
export interface DeviceActor {
  probeId: string;
  houseId: string;
}

/** A phone that showed the token of a follow link: it may see one run. */
export interface FollowerActor {
  linkId: string;
  houseId: string;
  runId: string;
}

/** What the handshake of a socket leaves in `socket.data`: one of the two. */
export interface SocketIdentity {
  actor?: Actor;
  device?: DeviceActor;
}

/** Finds the identity that the guard (HTTP) or the handshake (socket) has put down. */
export function identityOf(context: ExecutionContext): SocketIdentity {
  if (context.getType() === 'ws') return context.switchToWs().getClient<{ data: SocketIdentity }>().data;
  const request = context.switchToHttp().getRequest<{ user?: Actor; device?: DeviceActor }>();
  return { actor: request.user, device: request.device };
}

/** The signed-in member: `list(@Actor() actor: Actor)`. */
export const Actor = createParamDecorator((_: unknown, context: ExecutionContext): Actor => {
  const { actor } = identityOf(context);
  if (!actor) throw new ProblemError('not-signed-in', 'Sign in first.');
  return actor;
});

/** The probe at the device door: `push(@Device() device: DeviceActor)`. */
export const Device = createParamDecorator((_: unknown, context: ExecutionContext): DeviceActor => {
  const { device } = identityOf(context);
  if (!device) throw new ProblemError('device-token-unknown', 'Send the token of a probe.');
  return device;
});

/** The phone at the follow door: `see(@Follower() follower: FollowerActor)`. */
export const Follower = createParamDecorator((_: unknown, context: ExecutionContext): FollowerActor => {
  const { follower } = context.switchToHttp().getRequest<{ follower?: FollowerActor }>();
  if (!follower) throw new ProblemError('follow-link-unknown', 'Open the link again, or ask the house for a new one.');
  return follower;
});
