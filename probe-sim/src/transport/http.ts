import { pushedReadingsSchema, type PushedReadings } from '@steepfall/shared/contracts';
import { problem, problemSchema, type Problem } from '@steepfall/shared/problems';
import type { Reading } from '@steepfall/shared/readings';
import { errorOfProblem, HubAwayError, HubRefusedError, type Door } from './door.js';

const ANSWER_WITHIN_MS = 10_000;

/** The door for anything that can make a web request: one POST a batch. */
export function httpDoor(hub: string, deviceToken: string): Door {
  const stopped = new AbortController();
  return {
    async push(readings): Promise<PushedReadings> {
      const answer = await ask(`${hub}/api/device/readings`, {
        method: 'POST',
        headers: { ...bearer(deviceToken), 'content-type': 'application/json' },
        body: JSON.stringify({ readings } satisfies { readings: readonly Reading[] }),
        signal: AbortSignal.any([stopped.signal, AbortSignal.timeout(ANSWER_WITHIN_MS)]),
      });
      return understood(pushedReadingsSchema, answer, hub);
    },
    close: () => stopped.abort(),
  };
}

/**
 * A JSON answer of the hub.
 *
 * @throws HubAwayError, HubRefusedError or BatchRefusedError, as the answer means.
 */
export async function ask(url: string, request: RequestInit = {}): Promise<unknown> {
  const response = await fetch(url, { signal: AbortSignal.timeout(ANSWER_WITHIN_MS), ...request }).catch(
    (error: unknown) => {
      throw new HubAwayError(`No answer from ${new URL(url).origin} (${causeOf(error)}).`);
    },
  );
  const body: unknown = await response.json().catch(() => null);
  if (response.ok) return body;
  const retryAfterS = Number(response.headers.get('retry-after') ?? Number.NaN);
  throw errorOfProblem(problemOf(body, response, url), Number.isFinite(retryAfterS) ? retryAfterS * 1000 : null);
}

/** An answer in the agreed shape. Anything else comes from something that is no hub. */
export function understood<Answer>(
  schema: { safeParse(value: unknown): { success: true; data: Answer } | { success: false } },
  answer: unknown,
  hub: string,
): Answer {
  const parsed = schema.safeParse(answer);
  if (parsed.success) return parsed.data;
  throw new HubRefusedError(`What answers at ${hub} is no Steepfall hub of this version.`);
}

export function bearer(deviceToken: string): Record<string, string> {
  return { authorization: `Bearer ${deviceToken}` };
}

function problemOf(body: unknown, response: Response, url: string): Problem {
  const parsed = problemSchema.safeParse(body);
  if (parsed.success) return parsed.data;
  const plain = `${url} answered ${response.status} ${response.statusText}`.trim();
  return { ...problem('internal-error', `${plain}.`), status: response.status };
}

function causeOf(error: unknown): string {
  if (!(error instanceof Error)) return String(error);
  const { cause } = error;
  if (!(cause instanceof Error)) return error.message;
  const code = 'code' in cause ? cause.code : null;
  if (code === 'ECONNREFUSED') return 'nothing listens there';
  return code === 'ENOTFOUND' ? 'there is no such host' : cause.message;
}
