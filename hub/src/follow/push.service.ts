import { Injectable, Logger, type BeforeApplicationShutdown, type OnApplicationBootstrap } from '@nestjs/common';
import { InjectModel } from '@nestjs/sequelize';
import type { PushSubscription } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { Alert, RunState } from '@steepfall/shared/runs';
import type { Subscription } from 'rxjs';
import { UniqueConstraintError } from 'sequelize';
import type { FollowerActor } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { inHouse } from '../common/house-scope/in-house.js';
import { newId } from '../common/ids.js';
import { hashSecret } from '../common/secrets.js';
import { MembersService, presentMember } from '../members/members.service.js';
import { RunLogService, type Appended } from '../runs/run-log.service.js';
import type { RunLog } from '../runs/run-log.js';
import { FollowLinksService } from './follow-links.service.js';
import type { FollowLink } from './models/follow-link.model.js';
import { PushSubscriber } from './models/push-subscriber.model.js';
import { refuseOddEndpoint } from './push-endpoint.js';
import { newsForPhones, pushMessageOf } from './push-news.js';
import { PUSH_LIFE_S, PushSender } from './push-sender.js';

/** Phones on one link; a link that is passed around must not make the hub send without end. */
const MOST_PHONES = 20;

/** Notifications for phones that follow a run: the last channel, behind the tablets and the open page. */
@Injectable()
export class PushService implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger(PushService.name);
  private subscription: Subscription | null = null;
  /** What is on its way to each phone: one after the other, so that an earlier stage never comes last. */
  private readonly lines = new Map<string, Promise<void>>();

  constructor(
    @InjectModel(PushSubscriber) private readonly subscribers: typeof PushSubscriber,
    private readonly links: FollowLinksService,
    private readonly logs: RunLogService,
    private readonly members: MembersService,
    private readonly sender: PushSender,
    private readonly clock: Clock,
  ) {}

  onApplicationBootstrap(): void {
    this.subscription = this.logs.appended$.subscribe((appended) => this.take(appended));
  }

  async beforeApplicationShutdown(): Promise<void> {
    this.subscription?.unsubscribe();
    await Promise.all(this.lines.values());
  }

  /** The same phone twice is one phone. @param origin of the page, told to the push service as whom to turn to. */
  async subscribe(follower: FollowerActor, { endpoint, keys }: PushSubscription, origin: string): Promise<void> {
    if (this.sender.publicKey === null)
      throw new ProblemError('unavailable', 'This hub sends no notifications: it has no keys for them.');
    await refuseOddEndpoint(endpoint, (name) => this.sender.addressesOf(name));
    const rows = inHouse(this.subscribers, follower.houseId);
    const { linkId } = follower;
    const endpointHash = hashSecret(endpoint);
    const values = { endpoint, ...keys, contact: origin };
    const renew = () => rows.update({ linkId, endpointHash }, values);
    if ((await rows.count({ linkId, endpointHash })) > 0) return void (await renew());
    if ((await rows.count({ linkId })) >= MOST_PHONES)
      throw new ProblemError('already-exists', 'Enough phones listen to this link. Ask the house for another one.');
    try {
      await rows.create({ id: newId(), linkId, endpointHash, ...values, createdAtMs: this.clock.nowMs() });
    } catch (error) {
      if (!(error instanceof UniqueConstraintError)) throw error;
      await renew();
    }
  }

  async unsubscribe({ houseId, linkId }: FollowerActor, endpoint: string): Promise<void> {
    await inHouse(this.subscribers, houseId).destroy({ linkId, endpointHash: hashSecret(endpoint) });
  }

  private take({ log, before }: Appended): void {
    const { state } = log;
    const news = newsForPhones(before, state, this.clock.nowMs());
    if (news.length === 0 || this.sender.publicKey === null) return;
    this.tell(log, state, news).catch((error: unknown) =>
      this.logger.error('push.not-sent', error instanceof Error ? error.stack : String(error), { runId: log.id }),
    );
  }

  private async tell(log: RunLog, state: RunState, news: Alert[]): Promise<void> {
    for (const link of await this.links.openLinks(log, this.clock.nowMs())) {
      const phones = await inHouse(this.subscribers, link.houseId).findAll({ linkId: link.id });
      if (phones.length > 0) await this.tellPhones(link, phones, state, news);
    }
  }

  private async tellPhones(link: FollowLink, phones: PushSubscriber[], state: RunState, news: Alert[]): Promise<void> {
    const { units } = presentMember(await this.members.get(link.houseId, link.createdBy));
    const sentAtMs = this.clock.nowMs();
    for (const alert of news) {
      const message = pushMessageOf(state, alert, units, sentAtMs);
      for (const phone of phones) {
        this.inLine(phone.id, async () => {
          // The one before it took too long: by now it would be news of the past.
          if (this.clock.nowMs() - sentAtMs > PUSH_LIFE_S * 1000) return;
          if ((await this.sender.send(phone, message)) === 'gone')
            await inHouse(this.subscribers, phone.houseId).destroy({ id: phone.id });
        });
      }
    }
  }

  private inLine(phoneId: string, work: () => Promise<void>): void {
    const before = this.lines.get(phoneId) ?? Promise.resolve();
    const mine = before
      .then(work)
      .catch((error: unknown) =>
        this.logger.error('push.not-sent', error instanceof Error ? error.stack : String(error)),
      )
      .finally(() => {
        if (this.lines.get(phoneId) === mine) this.lines.delete(phoneId);
      });
    this.lines.set(phoneId, mine);
  }
}
