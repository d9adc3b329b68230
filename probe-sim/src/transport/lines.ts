import type { Reading } from '@steepfall/shared/readings';
import type { Sink } from './forwarder.js';

/** One JSON object a line, for pipes and for looking at. */
export function lineSink(write: (line: string) => void): Sink {
  return {
    offer: (readings: readonly Reading[]) => readings.forEach((reading) => write(`${JSON.stringify(reading)}\n`)),
    delivered: () => Promise.resolve(true),
    failure: null,
    close: () => undefined,
  };
}
