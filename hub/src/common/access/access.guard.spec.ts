import type { ExecutionContext } from '@nestjs/common';
import { Reflector, type ModuleRef } from '@nestjs/core';
import { describe, expect, it } from 'vitest';
import { DeviceOnly, Public, Requires, SignedIn } from './access.decorators.js';
import { AccessGuard } from './access.guard.js';
import type { Actor, SocketIdentity } from './actor.js';

class Gateway {
  forgotten(): void {}
  @Public()
  hello(): void {}
  @SignedIn()
  sync(): void {}
  @Requires('runs:act')
  act(): void {}
  @DeviceOnly()
  push(): void {}
}

const guard = new AccessGuard(new Reflector(), {} as ModuleRef);
const member = (role: Actor['role']): SocketIdentity => ({
  actor: { memberId: 'm', userId: 'u', houseId: 'h', sessionId: 's', role, expiresAtMs: 1 },
});
const probe: SocketIdentity = { device: { probeId: 'p', houseId: 'h' } };

/** A message of a socket whose handshake left this identity. */
function message(handler: keyof Gateway, identity: SocketIdentity): Promise<boolean> {
  const context = {
    getType: () => 'ws',
    getHandler: () => Gateway.prototype[handler],
    getClass: () => Gateway,
    switchToWs: () => ({ getClient: () => ({ data: identity }) }),
  } as unknown as ExecutionContext;
  return guard.canActivate(context);
}

describe(`${AccessGuard.name} on a socket`, () => {
  it('refuses a message without a rule, whoever sends it', async () => {
    await expect(message('forgotten', member('owner'))).rejects.toMatchObject({ type: 'not-allowed' });
  });

  it('holds a member against the permission table', async () => {
    expect(await message('act', member('hand'))).toBe(true);
    expect(await message('sync', member('taster'))).toBe(true);
    await expect(message('act', member('taster'))).rejects.toMatchObject({ type: 'not-allowed' });
    await expect(message('push', member('owner'))).rejects.toMatchObject({ type: 'not-allowed' });
  });

  it('lets a probe push readings and nothing else', async () => {
    expect(await message('push', probe)).toBe(true);
    await expect(message('act', probe)).rejects.toMatchObject({ type: 'not-signed-in' });
    await expect(message('sync', probe)).rejects.toMatchObject({ type: 'not-signed-in' });
  });

  it('lets nobody in who has no identity', async () => {
    expect(await message('hello', {})).toBe(true);
    await expect(message('sync', {})).rejects.toMatchObject({ type: 'not-signed-in' });
    await expect(message('push', {})).rejects.toMatchObject({ type: 'not-allowed' });
  });
});
