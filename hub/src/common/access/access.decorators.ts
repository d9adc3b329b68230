import { SetMetadata } from '@nestjs/common';
import type { Permission } from '@steepfall/shared/contracts';

export const ACCESS = 'steepfall:access';

/** Who may call a handler. A handler without a rule is refused. */
export type AccessRule =
  | { kind: 'public' }
  | { kind: 'signed-in' }
  | { kind: 'permission'; permission: Permission }
  | { kind: 'device' }
  | { kind: 'follower' };

/** Anybody, signed in or not. */
export const Public = () => SetMetadata<string, AccessRule>(ACCESS, { kind: 'public' });
/** Every signed-in member, whatever the role. */
export const SignedIn = () => SetMetadata<string, AccessRule>(ACCESS, { kind: 'signed-in' });
/** Members whose role has this right in the permission table. */
export const Requires = (permission: Permission) =>
  SetMetadata<string, AccessRule>(ACCESS, { kind: 'permission', permission });
/** A probe with its token; no member. */
export const DeviceOnly = () => SetMetadata<string, AccessRule>(ACCESS, { kind: 'device' });
/** A phone with the token of a follow link; no member, no probe. */
export const FollowerOnly = () => SetMetadata<string, AccessRule>(ACCESS, { kind: 'follower' });
