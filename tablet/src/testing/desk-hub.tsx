import type { Problem } from '@steepfall/shared/problems';
import { metricPreferences, type UnitPreferences } from '@steepfall/shared/units';
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { act, cleanup, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { vi } from 'vitest';
import { newId } from '#lib/ids.ts';
import { signIn, signOut } from '#lib/session.ts';

interface Asked {
  /** "POST stores/import". */
  what: string;
  body: unknown;
}

type Answer = (body: never) => unknown;

/** The hub as the desk sees it: an answer for each request that a spec expects, and what was asked. */
export class DeskHub {
  readonly asked: Asked[] = [];
  constructor(private readonly answers: Record<string, Answer>) {}

  /** A brewer of Wrenfold Drinks at this station. */
  async signIn(units: UnitPreferences = metricPreferences): Promise<void> {
    const member = {
      id: newId(),
      displayName: 'Brewer',
      email: 'brewer@wrenfold.example',
      role: 'brewer',
      isActive: true,
      units,
    };
    const house = { id: newId(), name: 'Wrenfold Drinks', altitudeM: 120, currency: 'EUR', version: 1 };
    this.answers['POST auth/sign-in'] = () => ({ accessToken: 'token', expiresAtMs: 4e12, member, house });
    this.answers['POST auth/sign-out'] = () => ({});
    vi.stubGlobal('fetch', this.fetch);
    vi.stubGlobal('ResizeObserver', NoObserver);
    await act(() => signIn({ email: member.email, password: 'a password' }));
  }

  async signOut(): Promise<void> {
    // What is still shown would miss its member.
    cleanup();
    await act(() => signOut());
    vi.unstubAllGlobals();
  }

  bodiesOf(what: string): unknown[] {
    return this.asked.filter((each) => each.what === what).map(({ body }) => body);
  }

  private readonly fetch = async (input: RequestInfo | URL, init?: RequestInit): Promise<Response> => {
    const path = new URL(String(input), 'http://hub').pathname.replace('/api/', '');
    const what = `${init?.method ?? 'GET'} ${path}`;
    const body = typeof init?.body === 'string' ? (JSON.parse(init.body) as unknown) : null;
    this.asked.push({ what, body });
    await Promise.resolve();
    const answer: unknown = this.answers[what]?.(body as never) ?? [];
    return Response.json(answer, { status: isProblem(answer) ? answer.status : 200 });
  };
}

class NoObserver {
  observe() {}
  unobserve() {}
  disconnect() {}
}

function isProblem(answer: unknown): answer is Problem {
  return typeof answer === 'object' && answer !== null && 'detail' in answer && 'status' in answer;
}

/** A page or a part of one at its path; other paths show themselves as text. */
export function renderAt(element: ReactNode, { path = '/', at = path }: { path?: string; at?: string } = {}) {
  const router = createMemoryRouter(
    [
      { path, element },
      { path: '*', element: <p>elsewhere</p> },
    ],
    {
      initialEntries: [at],
    },
  );
  const client = new QueryClient({ defaultOptions: { queries: { retry: false } } });
  render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return router;
}
