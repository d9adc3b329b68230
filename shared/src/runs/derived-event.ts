import { v5 as uuidV5 } from 'uuid';
import type { RunEvent, RunEventOf, RunEventType } from './events.js';

/** Names ids that several devices must come to alike. Any fixed UUID does; this one must never change. */
const DERIVED_ID_NAMESPACE = '6e0f3a52-1d0c-4f0f-9a5e-7c1b2d94b3e8';

/** A fact that nobody did: its id follows from what it says, so that all who find it write one and the same. */
export function derivedEvent<Type extends RunEventType>(
  { runId, station }: { runId: string; station: string },
  type: Type,
  name: string,
  atMs: number,
  payload: RunEventOf<Type>['payload'],
): RunEvent {
  const id = uuidV5(`${runId}/${type}/${name}`, DERIVED_ID_NAMESPACE);
  return { id, runId, type, v: 1, atMs: Math.round(atMs), by: null, station, payload } as RunEvent;
}
