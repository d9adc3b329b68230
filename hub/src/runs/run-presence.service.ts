import { Injectable } from '@nestjs/common';

export interface PresentStation {
  station: string;
  isHere: boolean;
  /** Hub wall time of the last coming or going. */
  sinceMs: number;
}

interface Place extends PresentStation {
  lineIds: Set<string>;
}

/**
 * Which stations have a run open. One that leaves is forgotten; one whose line is cut without a word stays in the list as gone, until it is
 * back. Held in memory: after a restart of the hub it is known again from the first join on.
 */
@Injectable()
export class RunPresence {
  private readonly runs = new Map<string, Map<string, Place>>();

  /** @param station what the device calls itself; one that says nothing counts as somebody, and is not missed. */
  join(runId: string, lineId: string, station: string | undefined, nowMs: number): void {
    const places = this.runs.get(runId) ?? new Map<string, Place>();
    this.runs.set(runId, places);
    const name = station ?? lineId;
    const place = places.get(name) ?? { station: name, isHere: false, sinceMs: nowMs, lineIds: new Set() };
    if (!place.isHere) Object.assign(place, { isHere: true, sinceMs: nowMs });
    place.lineIds.add(lineId);
    places.set(name, place);
  }

  leave(runId: string, lineId: string): void {
    const places = this.runs.get(runId);
    for (const { station, lineIds } of places?.values() ?? []) {
      if (lineIds.delete(lineId) && lineIds.size === 0) places?.delete(station);
    }
  }

  /** The line is gone, whoever cut it. */
  cut(lineId: string, nowMs: number): void {
    for (const places of this.runs.values()) {
      for (const place of places.values()) {
        if (place.lineIds.delete(lineId) && place.lineIds.size === 0)
          Object.assign(place, { isHere: false, sinceMs: nowMs });
      }
    }
  }

  of(runId: string): PresentStation[] {
    return [...(this.runs.get(runId)?.values() ?? [])];
  }

  /** Keeps what is known of these runs only. */
  keepOnly(runIds: ReadonlySet<string>): void {
    for (const runId of this.runs.keys()) if (!runIds.has(runId)) this.runs.delete(runId);
  }
}
