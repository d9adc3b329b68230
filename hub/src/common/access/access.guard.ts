import { Injectable, type ExecutionContext } from '@nestjs/common';
import { ModuleRef, Reflector } from '@nestjs/core';
import { AuthGuard } from '@nestjs/passport';
import { may } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Request } from 'express';
import { ACCESS, type AccessRule } from './access.decorators.js';
import { identityOf, type Actor, type DeviceActor, type FollowerActor } from './actor.js';
import { DeviceAuthenticator } from './device-authenticator.js';
import { FollowerAuthenticator } from './follower-authenticator.js';

/**
 * The one guard of the hub, over HTTP and over sockets: finds out who is asking and holds that against the rule of the handler and the
 * permission table. Nest runs it for socket messages too, but never for the handshake: that leaves the identity in `socket.data`.
 */
@Injectable()
export class AccessGuard extends AuthGuard('jwt') {
  constructor(
    private readonly reflector: Reflector,
    private readonly moduleRef: ModuleRef,
  ) {
    super();
  }

  override async canActivate(context: ExecutionContext): Promise<boolean> {
    const rule = this.reflector.getAllAndOverride<AccessRule | undefined>(ACCESS, [
      context.getHandler(),
      context.getClass(),
    ]);
    if (!rule) throw new ProblemError('not-allowed', 'Nobody may do this: it has no access rule.');
    if (rule.kind === 'public') return true;
    if (rule.kind === 'device') {
      await this.admitDevice(context);
      return true;
    }
    if (rule.kind === 'follower') {
      await this.admitFollower(context);
      return true;
    }
    if (context.getType() === 'http') await super.canActivate(context);
    const { actor } = identityOf(context);
    if (!actor) throw new ProblemError('not-signed-in', 'Sign in first.');
    if (rule.kind === 'permission' && !may(actor.role, rule.permission))
      throw new ProblemError('not-allowed', `A ${actor.role} may not do this. Ask an owner of the house.`);
    return true;
  }

  override handleRequest<User = Actor>(error: Error | null, user: User | false, info: unknown): User {
    if (error) throw error;
    if (user) return user;
    if (info instanceof Error && info.name === 'TokenExpiredError')
      throw new ProblemError('session-expired', 'Refresh the session and send it again.');
    throw new ProblemError('not-signed-in', 'Sign in first.');
  }

  private async admitDevice(context: ExecutionContext): Promise<void> {
    if (context.getType() === 'ws') {
      if (!identityOf(context).device) throw new ProblemError('not-allowed', 'Only a probe may send this.');
      return;
    }
    const request = context.switchToHttp().getRequest<Request & { device?: DeviceActor }>();
    const token = /^Bearer (\S{1,200})$/.exec(request.headers.authorization ?? '')?.[1];
    const device = token ? await this.moduleRef.get(DeviceAuthenticator, { strict: false }).authenticate(token) : null;
    if (!device)
      throw new ProblemError('device-token-unknown', 'Send the token of a probe as "Authorization: Bearer …".');
    request.device = device;
  }

  private async admitFollower(context: ExecutionContext): Promise<void> {
    if (context.getType() !== 'http') throw new ProblemError('not-allowed', 'Only a follower may ask for this.');
    const request = context.switchToHttp().getRequest<Request & { follower?: FollowerActor }>();
    const token = /^Follow ([\w-]{20,100})$/.exec(request.headers.authorization ?? '')?.[1];
    const authenticator = this.moduleRef.get(FollowerAuthenticator, { strict: false });
    const follower = token ? await authenticator.authenticate(token) : null;
    if (!follower)
      throw new ProblemError('follow-link-unknown', 'Open the link again, or ask the house for a new one.');
    request.follower = follower;
  }
}
