import { lookup } from 'node:dns/promises';
import { createHash } from 'node:crypto';
import { Agent } from 'node:https';
import { Injectable, Logger } from '@nestjs/common';
import type { PushMessage } from '@steepfall/shared/contracts';
import webPush from 'web-push';
import { HubConfig } from '../config/environment.js';
import { publicLookup } from './push-endpoint.js';

export interface PushAddress {
  endpoint: string;
  p256dh: string;
  auth: string;
  contact: string;
}

/** `gone`: the push service knows this phone no more, and never will again. */
export type PushOutcome = 'sent' | 'gone' | 'failed';

/** The push services of the browser makers: the only thing outside this house that the hub ever talks to. */
export abstract class PushSender {
  /** What phones subscribe with; `null` when this hub sends no notifications. */
  abstract readonly publicKey: string | null;
  abstract send(address: PushAddress, message: PushMessage): Promise<PushOutcome>;
  abstract addressesOf(hostname: string): Promise<string[]>;
}

/** An alert that comes a minute late is no help any more. */
export const PUSH_LIFE_S = 60;
const PATIENCE_MS = 10_000;

@Injectable()
export class WebPushSender extends PushSender {
  private readonly logger = new Logger(WebPushSender.name);
  private readonly agent = new Agent({ lookup: publicLookup, keepAlive: true });

  constructor(private readonly config: HubConfig) {
    super();
  }

  get publicKey(): string | null {
    return this.config.vapidKeys?.publicKey ?? null;
  }

  async addressesOf(hostname: string): Promise<string[]> {
    return (await lookup(hostname, { all: true })).map(({ address }) => address);
  }

  async send({ endpoint, p256dh, auth, contact }: PushAddress, message: PushMessage): Promise<PushOutcome> {
    const { vapidKeys, pushContact } = this.config;
    if (vapidKeys === null) return 'failed';
    try {
      await webPush.sendNotification({ endpoint, keys: { p256dh, auth } }, JSON.stringify(message), {
        vapidDetails: { subject: pushContact ?? contact, ...vapidKeys },
        TTL: PUSH_LIFE_S,
        urgency: 'high',
        topic: topicOf(message.tag),
        timeout: PATIENCE_MS,
        agent: this.agent,
      });
      return 'sent';
    } catch (error) {
      const status = error instanceof webPush.WebPushError ? error.statusCode : null;
      if (status === 404 || status === 410) return 'gone';
      // The address itself is a secret of the phone: only whose service it is gets written down.
      this.logger.warn('push.not-sent', { service: new URL(endpoint).hostname, status, reason: String(error) });
      return 'failed';
    }
  }
}

/** At most 32 characters; what still waits at the push service under this name is replaced. */
function topicOf(tag: string): string {
  return createHash('sha256').update(tag).digest('base64url').slice(0, 32);
}
