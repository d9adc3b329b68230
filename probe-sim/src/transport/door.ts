import type { PushedReadings } from '@steepfall/shared/contracts';
import { problemTypeOf, type Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';

/** A way into the hub for a device. */
export interface Door {
  /**
   * Hands over a batch and waits until the hub has it on disk.
   *
   * @throws HubAwayError when the same batch should be sent again later.
   * @throws BatchRefusedError when this batch will never be taken.
   * @throws HubRefusedError when nothing of this device will be taken.
   */
  push(readings: readonly Reading[]): Promise<PushedReadings>;
  close(): void;
}

/** No answer, or "not now". Whether the readings were stored is not known. */
export class HubAwayError extends Error {
  override readonly name = 'HubAwayError';
  constructor(
    message: string,
    /** How long the hub asks to be left alone. */
    readonly retryAfterMs: number | null = null,
  ) {
    super(message);
  }
}

export class BatchRefusedError extends Error {
  override readonly name = 'BatchRefusedError';
  constructor(
    message: string,
    readonly isTooLarge: boolean,
  ) {
    super(message);
  }
}

export class HubRefusedError extends Error {
  override readonly name = 'HubRefusedError';
}

/** What a problem means for the batch that met it. */
export function errorOfProblem(problem: Problem, retryAfterMs: number | null = null): Error {
  const detail = problem.detail || problem.title;
  if (problem.status === 429 || problem.status >= 500) return new HubAwayError(detail, retryAfterMs);
  if (problemTypeOf(problem) === 'device-token-unknown' || problem.status === 401) {
    return new HubRefusedError(`The hub does not know this device token: ${detail}`);
  }
  if (problem.status === 403 || problem.status === 404) return new HubRefusedError(detail);
  return new BatchRefusedError(detail, problem.status === 413);
}

/**
 * The address of a hub from what a person typed.
 *
 * @throws RangeError when it is no web address, or goes on after the host: a hub has the host to itself.
 */
export function hubAddress(text: string): string {
  const address = text.includes('://') ? text : `http://${text}`;
  const url = URL.canParse(address) ? new URL(address) : null;
  if (!url || !['http:', 'https:'].includes(url.protocol) || url.pathname !== '/' || url.search || url.hash) {
    throw new RangeError(`"${text}" is no address of a hub. Write http://host:port.`);
  }
  return url.origin;
}
