import { pushedReadingsSchema, type DeviceHandshake, type PushedReadings } from '@steepfall/shared/contracts';
import { problemSchema } from '@steepfall/shared/problems';
import { io } from 'socket.io-client';
import { errorOfProblem, HubAwayError, HubRefusedError, type Door } from './door.js';
import { understood } from './http.js';

const ANSWER_WITHIN_MS = 5000;

/** The door for a device that stays connected: the hub has a reading within milliseconds. */
export function socketDoor(hub: string, deviceToken: string): Door {
  const socket = io(hub, {
    autoConnect: false,
    transports: ['websocket'],
    auth: { deviceToken } satisfies DeviceHandshake,
    // A socket of its own: another door to the same hub may carry another token.
    forceNew: true,
    // Whoever pushes knows when it is worth another try.
    reconnection: false,
  });

  const connected = () =>
    new Promise<void>((resolve, reject) => {
      if (socket.connected) return resolve();
      const settle = (settled: () => void) => {
        clearTimeout(timer);
        socket.off('connect', onConnect);
        socket.off('connect_error', onError);
        settled();
      };
      const onConnect = () => settle(resolve);
      const onError = (error: Error & { data?: unknown }) => settle(() => reject(refusalOf(error, socket.active, hub)));
      const timer = setTimeout(
        () => settle(() => reject(new HubAwayError(`No connection to ${hub}.`))),
        ANSWER_WITHIN_MS,
      );
      socket.on('connect', onConnect);
      socket.on('connect_error', onError);
      socket.connect();
    });

  return {
    async push(readings): Promise<PushedReadings> {
      await connected();
      const answer: unknown = await socket
        .timeout(ANSWER_WITHIN_MS)
        .emitWithAck('readings.push', { readings })
        .catch((error: Error) => {
          throw new HubAwayError(`The hub did not acknowledge (${error.message}).`);
        });
      const refusal = problemSchema.safeParse((answer as { problem?: unknown } | null)?.problem);
      if (refusal.success) throw errorOfProblem(refusal.data);
      return understood(pushedReadingsSchema, answer, hub);
    },
    close: () => socket.disconnect(),
  };
}

/** A client stays active when the line is bad, and not when the hub itself said no. */
function refusalOf(error: Error & { data?: unknown }, isActive: boolean, hub: string): Error {
  if (isActive) return new HubAwayError(`No connection to ${hub} (${error.message}).`);
  const told = problemSchema.safeParse((error.data as { problem?: unknown } | undefined)?.problem ?? error.data);
  return told.success
    ? errorOfProblem(told.data)
    : new HubRefusedError(`The hub refused this device: ${error.message}`);
}
