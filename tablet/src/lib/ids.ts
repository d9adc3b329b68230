import { v7 as uuidv7 } from 'uuid';
import { keep, readKept } from './kept.ts';

/** An id that sorts by the time it was made. Works on plain HTTP too, where `crypto.randomUUID` is missing. */
export function newId(): string {
  return uuidv7();
}

const STATION_KEY = 'steepfall.station';
let unsavedStation: string | null = null;

/** The name of this device in every log it writes to; made once, kept as long as the browser keeps anything. */
export function stationName(): string {
  const kept = readKept(STATION_KEY);
  if (kept) return kept;
  unsavedStation ??= `station-${newId().slice(-6)}`;
  keep(STATION_KEY, unsavedStation);
  return unsavedStation;
}
