import type { z } from 'zod';
import { HubProblemError, requestHub, type HubRequest } from './http.ts';
import { getAccessToken, refreshSession } from './session.ts';

/**
 * One signed-in request. A token that ran out is renewed once, silently, and the request is sent again; callers that
 * meet it together share the renewal.
 *
 * @throws HubProblemError when the hub says no, HubUnreachableError when it says nothing.
 */
export async function callHub(path: string, request: Omit<HubRequest, 'accessToken'> = {}): Promise<unknown> {
  const token = getAccessToken() ?? (await refreshSession());
  try {
    return await requestHub(path, { ...request, accessToken: token });
  } catch (error) {
    if (!(error instanceof HubProblemError) || error.problem.status !== 401) throw error;
    // Another caller may have renewed it while this request was on its way.
    const current = getAccessToken();
    const renewed = current && current !== token ? current : await refreshSession();
    if (!renewed) throw error;
    return requestHub(path, { ...request, accessToken: renewed });
  }
}

/** `callHub` with its answer held against the contract. */
export async function callHubFor<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  request: Omit<HubRequest, 'accessToken'> = {},
): Promise<z.output<Schema>> {
  return schema.parse(await callHub(path, request));
}
