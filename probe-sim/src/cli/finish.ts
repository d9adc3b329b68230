import type { Connection } from './connect.js';
import { CommandError, exitCode } from './exit-code.js';
import type { Host } from './host.js';

/** Longest wait at the end for what is still on its way. */
const LAST_WAIT_MS = 5000;

/** Delivers the rest, says what came of it, and lets go of the hub. */
export async function finish({ sink, forwarder, close }: Connection, host: Host): Promise<void> {
  const isDelivered = await sink.delivered(LAST_WAIT_MS);
  close();
  if (sink.failure) throw new CommandError(sink.failure.message, exitCode.refused);
  if (!forwarder) return;
  const { accepted, duplicates, refused, dropped } = forwarder.counts;
  const rest = [
    [duplicates, 'known already'],
    [refused, 'refused'],
    [dropped, 'thrown away'],
  ] as const;
  const more = rest.filter(([count]) => count > 0).map(([count, what]) => `, ${count} ${what}`);
  host.notice(`${accepted} readings delivered${more.join('')}.`);
  if (!isDelivered) {
    throw new CommandError(
      `The hub is away: ${forwarder.waitingCount} readings were not delivered.`,
      exitCode.undelivered,
    );
  }
}
