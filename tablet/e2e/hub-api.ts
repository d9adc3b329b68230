import type { AppendedEvents, ProbeWithToken, RunSummary, Session } from '@steepfall/shared/contracts';
import type { RunEvent } from '@steepfall/shared/runs';
import type { DemoRole } from './browser.ts';

/** The HTTP door of a hub, signed in: to set a scene that no screen has to be clicked through for. */
export class HubApi {
  private constructor(
    private readonly url: string,
    readonly session: Session,
  ) {}

  static async signIn(url: string, role: DemoRole): Promise<HubApi> {
    const credentials = { email: `${role}@wrenfold.example`, password: `wrenfold-${role}` };
    return new HubApi(url, await call<Session>(`${url}/api/auth/sign-in`, credentials));
  }

  get<Answer>(path: string): Promise<Answer> {
    return call(`${this.url}/api/${path}`, undefined, this.session.accessToken);
  }

  post<Answer>(path: string, body: unknown): Promise<Answer> {
    return call(`${this.url}/api/${path}`, body, this.session.accessToken);
  }

  patch<Answer>(path: string, body: unknown): Promise<Answer> {
    return call(`${this.url}/api/${path}`, body, this.session.accessToken, 'PATCH');
  }

  addProbe(name: string, lagS: number): Promise<ProbeWithToken> {
    return this.post('probes', { name, lagS, resolutionC: 0.0625, samplePeriodS: 1 });
  }

  startRehearsal(settings: {
    rate: number;
    revisionId?: string;
    probeId?: string;
    seed?: number;
  }): Promise<RunSummary> {
    return this.post('rehearsals', settings);
  }

  append(runId: string, events: RunEvent[]): Promise<AppendedEvents> {
    return this.post(`runs/${runId}/events`, { events });
  }
}

async function call<Answer>(
  url: string,
  body: unknown,
  accessToken?: string,
  method = body === undefined ? 'GET' : 'POST',
): Promise<Answer> {
  const response = await fetch(url, {
    method,
    headers: {
      'content-type': 'application/json',
      ...(accessToken ? { authorization: `Bearer ${accessToken}` } : {}),
    },
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
  });
  if (!response.ok) throw new Error(`${url}: ${response.status} ${await response.text()}`);
  return (await response.json()) as Answer;
}
