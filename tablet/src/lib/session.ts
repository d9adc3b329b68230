import { useSyncExternalStore } from 'react';
import {
  houseSchema,
  may,
  memberSchema,
  sessionSchema,
  type House,
  type Member,
  type Permission,
  type SignIn,
} from '@steepfall/shared/contracts';
import { z } from 'zod';
import { HubProblemError, requestHub } from './http.ts';
import { keepValue, readKeptAs } from './kept.ts';

/** Who this station is signed in as. No secret in it: it survives a reload without the hub. */
export interface Known {
  member: Member;
  house: House;
}

export type SessionState =
  | { status: 'starting'; known: Known | null }
  | { status: 'signed-in'; known: Known }
  /** The hub does not answer, so nobody can say that the session has ended: work goes on. */
  | { status: 'unconfirmed'; known: Known | null }
  | { status: 'signed-out'; known: null; reason: 'asked' | 'expired' | 'never' };

const KEY = 'steepfall.known';
const knownSchema = z.object({ member: memberSchema, house: houseSchema });
const RETRY_MS = [2_000, 5_000, 15_000, 30_000];

let state: SessionState = { status: 'starting', known: null };
/** In memory only. The refresh token is in a cookie that no script can read. */
let accessToken: string | null = null;
let refreshing: Promise<string | null> | null = null;
let retryTimer: ReturnType<typeof setTimeout> | undefined;
let retryCount = 0;
/** Grows with each sign-in and sign-out: an answer to an older question must not undo the newer act. */
let generation = 0;
const listeners = new Set<() => void>();

function become(next: SessionState): void {
  state = next;
  keepValue(KEY, next.known);
  for (const listener of listeners) listener();
}

function accept(answer: unknown): string {
  const { accessToken: token, member, house } = sessionSchema.parse(answer);
  accessToken = token;
  retryCount = 0;
  clearTimeout(retryTimer);
  become({ status: 'signed-in', known: { member, house } });
  return token;
}

/** Two tabs that rotate one refresh token at once would look like theft to the hub: one after the other, then. */
function alone<T>(work: () => Promise<T>): Promise<T> {
  const locks = (navigator as Partial<Navigator>).locks;
  return locks ? locks.request('steepfall-session-refresh', work) : work();
}

async function refreshOnce(): Promise<string | null> {
  const asked = generation;
  try {
    const answer = await alone(() => requestHub('auth/refresh', { method: 'POST' }));
    return asked === generation ? accept(answer) : accessToken;
  } catch (error) {
    if (asked !== generation) return accessToken;
    accessToken = null;
    const isOver = error instanceof HubProblemError && error.problem.status === 401;
    if (isOver) {
      const hadSession = state.known !== null;
      become({ status: 'signed-out', known: null, reason: hadSession ? 'expired' : 'never' });
      return null;
    }
    become({ status: 'unconfirmed', known: state.known });
    clearTimeout(retryTimer);
    retryTimer = setTimeout(() => void refreshSession(), RETRY_MS[Math.min(retryCount, RETRY_MS.length - 1)]);
    retryCount += 1;
    return null;
  }
}

/** Asks for a new access token; all callers share one question. `null`: signed out, or no answer (see the state). */
export function refreshSession(): Promise<string | null> {
  refreshing ??= refreshOnce().finally(() => {
    refreshing = null;
  });
  return refreshing;
}

/** The token for the next request or handshake; `null` while there is none. */
export function getAccessToken(): string | null {
  return accessToken;
}

/** Shows who was signed in at once, then asks the hub. Called once, by main. */
export function startSession(): void {
  become({ status: 'starting', known: readKeptAs(knownSchema, KEY) });
  const askAgain = () => {
    if (state.status === 'unconfirmed' && document.visibilityState === 'visible') void refreshSession();
  };
  addEventListener('online', askAgain);
  document.addEventListener('visibilitychange', askAgain);
  void refreshSession();
}

export async function signIn(credentials: SignIn): Promise<void> {
  const answer = await requestHub('auth/sign-in', { method: 'POST', body: credentials });
  generation += 1;
  accept(answer);
}

/** Signs out here even when the hub cannot be told: the person who walks away must be able to rely on it. */
export async function signOut(): Promise<void> {
  const token = accessToken;
  generation += 1;
  accessToken = null;
  clearTimeout(retryTimer);
  become({ status: 'signed-out', known: null, reason: 'asked' });
  await requestHub('auth/sign-out', { method: 'POST', accessToken: token }).catch(() => undefined);
}

/** The house was edited here: the copy that the station keeps follows. */
export function noteHouse(house: House): void {
  if (state.status === 'signed-in') become({ ...state, known: { ...state.known, house } });
}

/** The member who works here changed something of their own. */
export function noteMember(member: Member): void {
  if (state.status === 'signed-in') become({ ...state, known: { ...state.known, member } });
}

export function subscribeSession(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

export function sessionState(): SessionState {
  return state;
}

export function useSession(): SessionState {
  return useSyncExternalStore(subscribeSession, sessionState);
}

/** The signed-in member and house. Only below the signed-in layout, where there is one. */
export function useKnown(): Known {
  const { known } = useSession();
  if (!known) throw new Error('No one is signed in on this station.');
  return known;
}

export function useMay(): (permission: Permission) => boolean {
  const { known } = useSession();
  return (permission) => known !== null && may(known.member.role, permission);
}
