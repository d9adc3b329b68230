import { useCallback, useEffect, useState } from 'react';
import { requestHub } from '#lib/http.ts';
import { failureWords } from '#lib/words.ts';

/** Whether notifications reach this phone when the page is closed, and what is in the way. */
export type PushState =
  | { kind: 'off' | 'on' | 'asking' | 'https-needed' | 'home-screen' | 'unsupported' | 'denied' | 'hub-off' }
  | { kind: 'failed'; why: string };

function isApple(): boolean {
  return (
    /iPhone|iPad|iPod/.test(navigator.userAgent) ||
    (/Macintosh/.test(navigator.userAgent) && navigator.maxTouchPoints > 1)
  );
}

function obstacle(pushKey: string | null): PushState | null {
  if (!window.isSecureContext) return { kind: 'https-needed' };
  if (!('serviceWorker' in navigator) || !('PushManager' in window) || !('Notification' in window))
    return { kind: isApple() ? 'home-screen' : 'unsupported' };
  if (pushKey === null) return { kind: 'hub-off' };
  return Notification.permission === 'denied' ? { kind: 'denied' } : null;
}

async function ready(): Promise<ServiceWorkerRegistration> {
  const waiting = new Promise<never>((_, fail) => setTimeout(() => fail(new Error('no worker')), 5_000));
  return Promise.race([navigator.serviceWorker.ready, waiting]);
}

async function tellHub(token: string, subscription: PushSubscription): Promise<void> {
  const { endpoint, keys } = subscription.toJSON();
  await requestHub('follow/subscriptions', { method: 'POST', followToken: token, body: { endpoint, keys } });
}

/** A subscription belongs to the key it was made with; a hub with a new one needs a new subscription. */
async function subscribed({ pushManager }: ServiceWorkerRegistration, pushKey: string): Promise<PushSubscription> {
  const options = { userVisibleOnly: true, applicationServerKey: pushKey };
  try {
    return await pushManager.subscribe(options);
  } catch (error) {
    const old = await pushManager.getSubscription();
    if (!old) throw error;
    await old.unsubscribe();
    return pushManager.subscribe(options);
  }
}

export function usePush(token: string, pushKey: string | null) {
  const [state, setState] = useState<PushState>(() => obstacle(pushKey) ?? { kind: 'off' });

  // Subscriptions run out without a word: what this phone has is told again each time the page is opened.
  useEffect(() => {
    if (obstacle(pushKey) !== null || Notification.permission !== 'granted') return;
    let isHere = true;
    void (async () => {
      const subscription = await (await navigator.serviceWorker.getRegistration())?.pushManager.getSubscription();
      if (!subscription) return;
      await tellHub(token, subscription);
      if (isHere) setState({ kind: 'on' });
    })().catch(() => undefined);
    return () => {
      isHere = false;
    };
  }, [token, pushKey]);

  /** Inside a tap: the browser asks the person. */
  const turnOn = useCallback(async () => {
    if (pushKey === null) return;
    setState({ kind: 'asking' });
    try {
      if ((await Notification.requestPermission()) !== 'granted') return setState(obstacle(pushKey) ?? { kind: 'off' });
      await tellHub(token, await subscribed(await ready(), pushKey));
      setState({ kind: 'on' });
    } catch (error) {
      const isOurs = error instanceof Error && /^Hub/.test(error.name);
      setState({
        kind: 'failed',
        why: isOurs ? failureWords(error) : 'The browser got no address from its push service. It needs the Internet.',
      });
    }
  }, [token, pushKey]);

  const turnOff = useCallback(async () => {
    const subscription = await (await navigator.serviceWorker.getRegistration())?.pushManager.getSubscription();
    if (subscription) {
      const body = { endpoint: subscription.endpoint };
      await requestHub('follow/subscriptions', { method: 'DELETE', followToken: token, body }).catch(() => undefined);
      await subscription.unsubscribe();
    }
    setState({ kind: 'off' });
  }, [token]);

  return { state, turnOn, turnOff };
}

/** What was pushed for an alert that stands no more is taken off the lock screen. */
export function useTidyNotifications(tags: string): void {
  useEffect(() => {
    if (!('serviceWorker' in navigator) || !('Notification' in window) || Notification.permission !== 'granted') return;
    const standing = tags.split('\n');
    void (async () => {
      const shown = await (await navigator.serviceWorker.getRegistration())?.getNotifications();
      for (const notification of shown ?? []) if (!standing.includes(notification.tag)) notification.close();
    })().catch(() => undefined);
  }, [tags]);
}
