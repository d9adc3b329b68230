import { problem, problemSchema, problemTypeOf, type Problem, type ProblemType } from '@steepfall/shared/problems';

/** The hub answered, and said no. Switch on `type`, never on the text. */
export class HubProblemError extends Error {
  override readonly name = 'HubProblemError';
  readonly type: ProblemType | null;
  constructor(readonly problem: Problem) {
    super(problem.detail);
    this.type = problemTypeOf(problem);
  }
}

/** No answer at all: the hub is off, the network is gone, or something between them cut the line. */
export class HubUnreachableError extends Error {
  override readonly name = 'HubUnreachableError';
  constructor(cause: unknown) {
    super('The hub does not answer.', { cause });
  }
}

export interface HubRequest {
  method?: 'GET' | 'POST' | 'PATCH' | 'DELETE';
  body?: unknown;
  query?: Record<string, string | number | undefined>;
  accessToken?: string | null;
  signal?: AbortSignal | undefined;
}

export type Fetch = typeof fetch;

function urlOf(path: string, query: HubRequest['query']): string {
  const pairs = Object.entries(query ?? {}).filter(([, value]) => value !== undefined);
  const search = new URLSearchParams(pairs.map(([key, value]) => [key, String(value)])).toString();
  return `/api/${path}${search ? `?${search}` : ''}`;
}

async function readProblem(response: Response): Promise<Problem> {
  try {
    const parsed = problemSchema.safeParse(await response.json());
    if (parsed.success) return parsed.data;
  } catch {
    // Not JSON: something in front of the hub answered.
  }
  const isGone = response.status === 502 || response.status === 503 || response.status === 504;
  return problem(isGone ? 'unavailable' : 'internal-error', `The hub answered with ${response.status} and no reason.`);
}

/** One request to the hub's API. Gives the JSON of the answer, `undefined` for 204. */
export async function requestHub(path: string, request: HubRequest = {}, send: Fetch = fetch): Promise<unknown> {
  const { method = 'GET', body, query, accessToken, signal } = request;
  const headers = new Headers({ Accept: 'application/json, application/problem+json' });
  if (accessToken) headers.set('Authorization', `Bearer ${accessToken}`);
  if (body !== undefined) headers.set('Content-Type', 'application/json');
  let response: Response;
  try {
    response = await send(urlOf(path, query), {
      method,
      headers,
      credentials: 'same-origin',
      body: body === undefined ? null : JSON.stringify(body),
      signal: signal ?? null,
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new HubUnreachableError(error);
  }
  if (!response.ok) throw new HubProblemError(await readProblem(response));
  if (response.status === 204) return undefined;
  try {
    return await response.json();
  } catch (error) {
    throw new HubUnreachableError(error);
  }
}
