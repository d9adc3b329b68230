import type { Ack, ClientToHubEvents, HubToClientEvents, RefusedAck } from '@steepfall/shared/contracts';
import type { Problem } from '@steepfall/shared/problems';
import type { ValueStore } from '../value-store.ts';

export type AskName = keyof ClientToHubEvents;
export type AskMessage<Name extends AskName> = Parameters<ClientToHubEvents[Name]>[0];
export type AskAnswer<Name extends AskName> =
  Parameters<ClientToHubEvents[Name]>[1] extends Ack<infer Answer> ? Exclude<Answer, RefusedAck> : never;

export interface LinkState {
  /** `off`: nobody asked for it yet, or nobody is signed in. `away`: the hub does not answer; it is tried again. */
  status: 'off' | 'connecting' | 'connected' | 'away';
  /** Wall time of this device, epoch ms: since when it is so. */
  sinceMs: number;
  /** Why the hub refused the line, when it did. */
  problem: Problem | null;
}

/** The line to the hub, in the part that the rest of the tablet needs. */
export interface HubLink {
  readonly state: ValueStore<LinkState>;
  /**
   * One question, one answer.
   *
   * @throws HubProblemError when the hub says no, HubUnreachableError when it says nothing in time.
   */
  ask<Name extends AskName>(name: Name, message: AskMessage<Name>, timeoutMs?: number): Promise<AskAnswer<Name>>;
  on<Name extends keyof HubToClientEvents>(name: Name, handler: HubToClientEvents[Name]): () => void;
}
