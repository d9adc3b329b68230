import { Logger, UseFilters, type BeforeApplicationShutdown, type OnModuleDestroy } from '@nestjs/common';
import {
  ConnectedSocket,
  MessageBody,
  SubscribeMessage,
  WebSocketGateway,
  type OnGatewayConnection,
  type OnGatewayDisconnect,
  type OnGatewayInit,
} from '@nestjs/websockets';
import {
  joinRunSchema,
  leaveRunSchema,
  may,
  pushReadingsSchema,
  syncTimeSchema,
  type AppendedEvents,
  type ClientToHubEvents,
  type HubToClientEvents,
  type JoinedRun,
  type JoinRun,
  type LeaveRun,
  type PushedReadings,
  type PushReadings,
  type SyncTime,
} from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import type { Subscription } from 'rxjs';
import type { DefaultEventsMap, Server, Socket } from 'socket.io';
import { DeviceOnly, Requires, SignedIn } from '../common/access/access.decorators.js';
import { Actor, Device, type DeviceActor, type SocketIdentity } from '../common/access/actor.js';
import { Clock } from '../common/clock.js';
import { ProbesService } from '../probes/probes.service.js';
import { IngestionService, type AcceptedReadings } from '../readings/ingestion.service.js';
import { RunReadingsService } from '../readings/run-readings.service.js';
import { RunLogService } from '../runs/run-log.service.js';
import { RunPresence } from '../runs/run-presence.service.js';
import { RunSummariesService } from '../runs/run-summaries.service.js';
import { sentToRunSchema, type SentToRun } from '../runs/sent-events.schema.js';
import { SessionsService } from '../sessions/sessions.service.js';
import { Handshake, HandshakeRefusedError } from './handshake.js';
import { Pacer } from './pacer.js';
import { SocketAuditor } from './socket-auditor.js';
import { SocketProblemFilter } from './socket-problem.filter.js';

type HubServer = Server<ClientToHubEvents, HubToClientEvents, DefaultEventsMap, SocketIdentity>;
type HubSocket = Socket<ClientToHubEvents, HubToClientEvents, DefaultEventsMap, SocketIdentity>;

/** As much as the HTTP doors take: ten thousand readings, or five hundred events. */
const LARGEST_MESSAGE_BYTES = 2_000_000;
const READINGS_EVERY_MS = 50;
const CHANGES_EVERY_MS = 250;
const AUDIT_EVERY_MS = 30_000;
/** Older readings are history: a tablet gets them when it joins or asks. */
const LIVE_MS = 15 * 60_000;

const runRoom = (runId: string) => `run:${runId}`;
const houseRoom = (houseId: string) => `house:${houseId}`;
const sessionRoom = (sessionId: string) => `session:${sessionId}`;
const probeRoom = (probeId: string) => `probe:${probeId}`;

interface LiveReadings {
  readings: Reading[];
  probeId: string;
  acceptedMs: number;
}

/** The line that stays open: events and readings of a run as they come, for tablets; a quick door for probes. */
@WebSocketGateway({
  transports: ['websocket'],
  serveClient: false,
  // A line that is dead must not look alive for long.
  pingInterval: 5_000,
  pingTimeout: 4_000,
  maxHttpBufferSize: LARGEST_MESSAGE_BYTES,
})
@UseFilters(SocketProblemFilter)
export class RealtimeGateway
  implements
    OnGatewayInit<HubServer>,
    OnGatewayConnection<HubSocket>,
    OnGatewayDisconnect<HubSocket>,
    OnModuleDestroy,
    BeforeApplicationShutdown
{
  private readonly logger = new Logger(RealtimeGateway.name);
  private readonly subscriptions: Subscription[] = [];
  private server: HubServer | null = null;
  private auditTimer: NodeJS.Timeout | null = null;

  private readonly readingPacer = new Pacer<LiveReadings>({
    everyMs: READINGS_EVERY_MS,
    merge: (waiting, newer) => ({ ...waiting, readings: [...waiting.readings, ...newer.readings] }),
    emit: (runId, live) => this.server?.to(runRoom(runId)).volatile.emit('run.readings', { runId, ...live }),
  });

  private readonly changePacer = new Pacer<{ houseId: string }>({
    everyMs: CHANGES_EVERY_MS,
    merge: (waiting) => waiting,
    emit: (runId, { houseId }) => this.server?.to(houseRoom(houseId)).emit('runs.changed', { runId }),
  });

  constructor(
    private readonly handshake: Handshake,
    private readonly auditor: SocketAuditor,
    private readonly logs: RunLogService,
    private readonly presence: RunPresence,
    private readonly summaries: RunSummariesService,
    private readonly ingestion: IngestionService,
    private readonly readings: RunReadingsService,
    private readonly sessions: SessionsService,
    private readonly probes: ProbesService,
    private readonly clock: Clock,
  ) {}

  afterInit(server: HubServer): void {
    this.server = server;
    server.use((socket, next) => {
      this.handshake.identify(socket.handshake.auth).then(
        (identity) => {
          Object.assign(socket.data, identity);
          next();
        },
        (error: unknown) => next(new HandshakeRefusedError(error)),
      );
    });
    this.subscriptions.push(
      this.logs.appended$.subscribe(({ log, events }) =>
        server.to(runRoom(log.id)).emit('run.events', { runId: log.id, events }),
      ),
      this.logs.changed$.subscribe(({ runId, houseId }) => this.changePacer.offer(runId, { houseId })),
      this.ingestion.accepted$.subscribe((accepted) => this.fan(accepted)),
      this.sessions.ended$.subscribe(({ sessionId }) => server.in(sessionRoom(sessionId)).disconnectSockets(true)),
      this.probes.tokenEnded$.subscribe((probeId) => server.in(probeRoom(probeId)).disconnectSockets(true)),
    );
    this.auditTimer = setInterval(() => void this.audit(), AUDIT_EVERY_MS);
  }

  handleConnection(socket: HubSocket): void {
    const { actor, device } = socket.data;
    if (device) void socket.join(probeRoom(device.probeId));
    if (!actor) return;
    void socket.join(sessionRoom(actor.sessionId));
    // Who may see neither runs nor batches has no list that could be out of date.
    if (may(actor.role, 'runs:read') || may(actor.role, 'batches:read')) void socket.join(houseRoom(actor.houseId));
  }

  handleDisconnect(socket: HubSocket): void {
    this.presence.cut(socket.id, this.clock.nowMs());
  }

  onModuleDestroy(): void {
    for (const subscription of this.subscriptions) subscription.unsubscribe();
    if (this.auditTimer) clearInterval(this.auditTimer);
    this.readingPacer.close();
    this.changePacer.close();
  }

  /** The line is cut, not said goodbye on: clients come back by themselves when the hub does. */
  beforeApplicationShutdown(): void {
    for (const socket of this.server?.sockets.sockets.values() ?? []) socket.conn.close();
  }

  /** Sends away whose right to be here has ended, such as a member who was taken out. */
  async audit(): Promise<void> {
    try {
      const sockets = [...(this.server?.sockets.sockets.values() ?? [])];
      for (const socket of await this.auditor.outdated(sockets)) socket.disconnect(true);
    } catch (error) {
      this.logger.error('sockets.not-audited', error instanceof Error ? error.stack : String(error));
    }
  }

  @SubscribeMessage('run.join')
  @Requires('runs:read')
  async join(
    @Actor() actor: Actor,
    @ConnectedSocket() socket: HubSocket,
    @MessageBody({ schema: joinRunSchema }) { runId, afterSeq, station }: JoinRun,
  ): Promise<JoinedRun> {
    const log = await this.logs.get(actor.houseId, runId);
    // Into the room first: what comes from now on comes twice rather than never.
    await socket.join(runRoom(runId));
    const nowMs = this.clock.nowMs();
    if (socket.connected) this.presence.join(runId, socket.id, station, nowMs);
    const [run, readings] = await Promise.all([
      this.summaries.get(actor.houseId, runId),
      this.readings.recent(log, nowMs),
    ]);
    return { run, events: log.eventsAfter(afterSeq), readings, nowMs: this.clock.nowMs() };
  }

  @SubscribeMessage('run.leave')
  @SignedIn()
  async leave(
    @ConnectedSocket() socket: HubSocket,
    @MessageBody({ schema: leaveRunSchema }) { runId }: LeaveRun,
  ): Promise<{ left: true }> {
    await socket.leave(runRoom(runId));
    this.presence.leave(runId, socket.id);
    return { left: true };
  }

  @SubscribeMessage('run.append')
  @Requires('runs:act')
  append(
    @Actor() actor: Actor,
    @MessageBody({ schema: sentToRunSchema }) { runId, events }: SentToRun,
  ): Promise<AppendedEvents> {
    return this.logs.append(actor.houseId, runId, events, actor.memberId);
  }

  @SubscribeMessage('readings.push')
  @DeviceOnly()
  push(
    @Device() { probeId }: DeviceActor,
    @MessageBody({ schema: pushReadingsSchema }) { readings }: PushReadings,
  ): Promise<PushedReadings> {
    return this.ingestion.ingest(probeId, readings);
  }

  @SubscribeMessage('time.sync')
  @SignedIn()
  syncTime(@MessageBody({ schema: syncTimeSchema }) { sentMs }: SyncTime): { sentMs: number; hubMs: number } {
    return { sentMs, hubMs: this.clock.nowMs() };
  }

  private fan({ log, readings, nowMs, acceptedMs }: AcceptedReadings): void {
    const live = readings.filter(({ atMs }) => atMs >= nowMs - LIVE_MS);
    const probeId = log.facts.probeId as string;
    if (live.length > 0) this.readingPacer.offer(log.id, { readings: live, probeId, acceptedMs });
  }
}
