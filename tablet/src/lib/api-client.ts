import type { z } from 'zod';
import { HubProblemError, requestHub, requestHubFile, uploadToHub, type HubRequest, type Upload } from './http.ts';
import { getAccessToken, refreshSession } from './session.ts';

type Ask = Omit<HubRequest, 'accessToken'>;

/**
 * Does a request with the token of whoever is signed in. A token that ran out is renewed once, silently, and the request is sent again;
 * callers that meet it together share the renewal.
 *
 * @throws HubProblemError when the hub says no, HubUnreachableError when it says nothing.
 */
async function withToken<Answer>(send: (accessToken: string | null) => Promise<Answer>): Promise<Answer> {
  const token = getAccessToken() ?? (await refreshSession());
  try {
    return await send(token);
  } catch (error) {
    if (!(error instanceof HubProblemError) || error.problem.status !== 401) throw error;
    // Another caller may have renewed it while this request was on its way.
    const current = getAccessToken();
    const renewed = current && current !== token ? current : await refreshSession();
    if (!renewed) throw error;
    return send(renewed);
  }
}

/** One signed-in request; throws as `withToken`. */
export async function callHub(path: string, request: Ask = {}): Promise<unknown> {
  return withToken((accessToken) => requestHub(path, { ...request, accessToken }));
}

/** `callHub` with its answer held against the contract. */
export async function callHubFor<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  request: Ask = {},
): Promise<z.output<Schema>> {
  return schema.parse(await callHub(path, request));
}

/** A file that only those who are signed in may fetch: a photo, an export. */
export function fetchHubFile(path: string, request: Ask = {}): Promise<Blob> {
  return withToken((accessToken) => requestHubFile(path, { ...request, accessToken }));
}

/** Sends a file, and holds the answer against the contract. */
export async function sendHubFile<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  upload: Omit<Upload, 'accessToken'>,
): Promise<z.output<Schema>> {
  return schema.parse(await withToken((accessToken) => uploadToHub(path, { ...upload, accessToken })));
}
