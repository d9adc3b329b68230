import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { askToStayAwake, keepAwake, wakeState } from './wake-lock.ts';

class FakeSentinel extends EventTarget {
  release = vi.fn(async () => {
    this.dispatchEvent(new Event('release'));
  });
}

let letSleep: () => void = () => undefined;

function stub({
  isSecure = true,
  wakeLock,
}: {
  isSecure?: boolean;
  wakeLock?: { request: () => Promise<unknown> } | undefined;
}) {
  vi.stubGlobal('isSecureContext', isSecure);
  Object.defineProperty(navigator, 'wakeLock', { value: wakeLock, configurable: true });
}

beforeEach(() => {
  wakeState.set('idle');
});
afterEach(() => {
  letSleep();
  vi.unstubAllGlobals();
});

describe(keepAwake, () => {
  it('is awake while it holds the lock, and lets go', async () => {
    const sentinel = new FakeSentinel();
    stub({ wakeLock: { request: async () => sentinel } });
    letSleep = keepAwake();
    await vi.waitFor(() => expect(wakeState.get()).toBe('awake'));
    letSleep();
    expect(sentinel.release).toHaveBeenCalled();
    expect(wakeState.get()).toBe('idle');
  });

  it('asks again when the lock was taken away', async () => {
    const sentinels = [new FakeSentinel(), new FakeSentinel()];
    const request = vi.fn(async () => sentinels[request.mock.calls.length - 1]!);
    stub({ wakeLock: { request } });
    letSleep = keepAwake();
    await vi.waitFor(() => expect(wakeState.get()).toBe('awake'));
    sentinels[0]!.dispatchEvent(new Event('release'));
    await vi.waitFor(() => expect(wakeState.get()).toBe('awake'));
    expect(request).toHaveBeenCalledTimes(2);
  });

  it('says why it cannot: no HTTPS, no such thing, refused', async () => {
    stub({ isSecure: false });
    letSleep = keepAwake();
    expect(wakeState.get()).toBe('https-needed');
    letSleep();

    stub({ wakeLock: undefined });
    letSleep = keepAwake();
    expect(wakeState.get()).toBe('unsupported');
    letSleep();

    stub({ wakeLock: { request: () => Promise.reject(new DOMException('low battery', 'NotAllowedError')) } });
    letSleep = keepAwake();
    await vi.waitFor(() => expect(wakeState.get()).toBe('refused'));
  });

  it('gets with a tap what it was refused without one', async () => {
    const request = vi
      .fn<() => Promise<unknown>>()
      .mockRejectedValueOnce(new DOMException('no gesture', 'NotAllowedError'));
    stub({ wakeLock: { request } });
    letSleep = keepAwake();
    await vi.waitFor(() => expect(wakeState.get()).toBe('refused'));
    request.mockResolvedValueOnce(new FakeSentinel());
    askToStayAwake();
    await vi.waitFor(() => expect(wakeState.get()).toBe('awake'));
  });
});
