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
  /** In place of a sign-in: the token of a follow link. */
  followToken?: string;
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

/** One request to the hub's API, as far as an answer that says yes. */
async function askHub(path: string, request: HubRequest, accept: string, send: Fetch): Promise<Response> {
  const { method = 'GET', body, query, accessToken, followToken, signal } = request;
  const headers = new Headers({ Accept: `${accept}, application/problem+json` });
  if (accessToken) headers.set('Authorization', `Bearer ${accessToken}`);
  if (followToken) headers.set('Authorization', `Follow ${followToken}`);
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
  return response;
}

/** Gives the JSON of the answer, `undefined` for 204. */
export async function requestHub(path: string, request: HubRequest = {}, send: Fetch = fetch): Promise<unknown> {
  const response = await askHub(path, request, 'application/json', send);
  if (response.status === 204) return undefined;
  try {
    return await response.json();
  } catch (error) {
    throw new HubUnreachableError(error);
  }
}

/** Gives the body as it is: a picture, a file to keep. */
export async function requestHubFile(path: string, request: HubRequest = {}): Promise<Blob> {
  const response = await askHub(path, request, '*/*', fetch);
  try {
    return await response.blob();
  } catch (error) {
    throw new HubUnreachableError(error);
  }
}

export interface Upload {
  form: FormData;
  accessToken: string | null;
  /** From 0 to 1. */
  onProgress?: ((ratio: number) => void) | undefined;
  signal?: AbortSignal | undefined;
}

/** Sends a file. By XMLHttpRequest, since `fetch` does not tell how far it is. */
export function uploadToHub(path: string, { form, accessToken, onProgress, signal }: Upload): Promise<unknown> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', urlOf(path, undefined));
    request.setRequestHeader('Accept', 'application/json, application/problem+json');
    if (accessToken) request.setRequestHeader('Authorization', `Bearer ${accessToken}`);
    request.upload.onprogress = ({ loaded, total }) => onProgress?.(total > 0 ? loaded / total : 0);
    request.onerror = () => reject(new HubUnreachableError('The connection was cut.'));
    request.onabort = () => reject(new DOMException('Stopped.', 'AbortError'));
    request.onload = () => {
      const answer = new Response(request.responseText, { status: request.status });
      if (answer.ok) answer.json().then(resolve, (error: unknown) => reject(new HubUnreachableError(error)));
      else void readProblem(answer).then((told) => reject(new HubProblemError(told)));
    };
    signal?.addEventListener('abort', () => request.abort());
    request.send(form);
  });
}
