import {
  PROTOCOL_VERSION,
  type ClientToHubEvents,
  type DeviceHandshake,
  type HubToClientEvents,
  type MemberHandshake,
} from '@steepfall/shared/contracts';
import { problemSchema, type Problem } from '@steepfall/shared/problems';
import { io, type Socket } from 'socket.io-client';
import type { SignedInMember } from './builders.js';
import type { TestApp } from './create-test-app.js';

export type HubSocket = Socket<HubToClientEvents, ClientToHubEvents>;

type Message<Name extends keyof ClientToHubEvents> = Parameters<ClientToHubEvents[Name]>[0];
type AnswerOf<Name extends keyof ClientToHubEvents> = Exclude<
  Parameters<Parameters<ClientToHubEvents[Name]>[1]>[0],
  { problem: Problem }
>;

const opened = new Set<HubSocket>();

/** A real client on a line of its own. It does not come back by itself: specs that want that say so. */
export function openSocket(
  { url }: Pick<TestApp, 'url'>,
  auth: Partial<MemberHandshake> | DeviceHandshake | object,
  reconnection = false,
): HubSocket {
  const socket: HubSocket = io(url, {
    transports: ['websocket'],
    forceNew: true,
    reconnection,
    reconnectionDelay: 50,
    auth,
  });
  opened.add(socket);
  return socket;
}

/** Connected, or the problem that the handshake met. */
export function handshake(socket: HubSocket): Promise<Problem | null> {
  return new Promise((resolve, reject) => {
    socket.once('connect', () => resolve(null));
    socket.once('connect_error', (error: Error & { data?: { problem?: unknown } }) => {
      const problem = problemSchema.safeParse(error.data?.problem);
      if (problem.success) resolve(problem.data);
      else reject(error);
    });
  });
}

export async function connected(socket: HubSocket): Promise<HubSocket> {
  const problem = await handshake(socket);
  if (problem) throw new Error(`The hub let nobody in: ${problem.detail}`);
  return socket;
}

export function connectMember(testApp: Pick<TestApp, 'url'>, { accessToken }: SignedInMember): Promise<HubSocket> {
  return connected(openSocket(testApp, { accessToken, protocol: PROTOCOL_VERSION }));
}

export function connectDevice(testApp: Pick<TestApp, 'url'>, deviceToken: string): Promise<HubSocket> {
  return connected(openSocket(testApp, { deviceToken }));
}

/** The answer or the problem; throws when there is neither within the time. */
export async function askRaw(socket: HubSocket, name: string, message: unknown, withinMs = 5000): Promise<unknown> {
  return (socket as unknown as Socket).timeout(withinMs).emitWithAck(name, message) as Promise<unknown>;
}

export async function ask<Name extends keyof ClientToHubEvents>(
  socket: HubSocket,
  name: Name,
  message: Message<Name>,
): Promise<AnswerOf<Name>> {
  const answer = (await askRaw(socket, name, message)) as { problem?: Problem };
  if (answer.problem) throw new Error(`${name}: ${answer.problem.type} ${answer.problem.detail}`);
  return answer as AnswerOf<Name>;
}

export async function askProblem(socket: HubSocket, name: keyof ClientToHubEvents, message: unknown): Promise<Problem> {
  const { problem } = (await askRaw(socket, name, message)) as { problem?: unknown };
  return problemSchema.parse(problem);
}

export function disconnected(socket: HubSocket): Promise<string> {
  return new Promise((resolve) => {
    if (socket.disconnected) resolve('already');
    else socket.once('disconnect', (reason) => resolve(reason));
  });
}

/** Everything of this name that comes in, as it comes. */
export function collect<Name extends keyof HubToClientEvents>(
  socket: HubSocket,
  name: Name,
): Parameters<HubToClientEvents[Name]>[0][] {
  const messages: Parameters<HubToClientEvents[Name]>[0][] = [];
  (socket as unknown as Socket).on(name as string, (message: Parameters<HubToClientEvents[Name]>[0]) =>
    messages.push(message),
  );
  return messages;
}

/** Closes every socket of the spec file. */
export function closeSockets(): void {
  for (const socket of opened) socket.disconnect();
  opened.clear();
}

export async function until(isTrue: () => boolean | Promise<boolean>, withinMs = 5000): Promise<void> {
  const endsAtMs = Date.now() + withinMs;
  while (!(await isTrue())) {
    if (Date.now() > endsAtMs) throw new Error('It did not come true in time.');
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
}
