import { Module } from '@nestjs/common';
import { MembersModule } from '../members/members.module.js';
import { ProbesModule } from '../probes/probes.module.js';
import { ReadingsModule } from '../readings/readings.module.js';
import { RunsModule } from '../runs/runs.module.js';
import { SessionsModule } from '../sessions/sessions.module.js';
import { Handshake } from './handshake.js';
import { RealtimeGateway } from './realtime.gateway.js';
import { SocketAuditor } from './socket-auditor.js';

@Module({
  imports: [RunsModule, ReadingsModule, ProbesModule, MembersModule, SessionsModule],
  providers: [RealtimeGateway, Handshake, SocketAuditor],
})
export class RealtimeModule {}
