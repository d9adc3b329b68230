import { fault, faultyLine, type Fault } from '../faults/index.js';
import { defaultKettle, kettleRun, readProbe, type KettleOverrides } from '../kettle/index.js';
import { DAY, followScript, scriptFromText, type ScriptedAct } from '../play/act-script.js';
import { play } from '../play/play.js';
import { kettleSource } from '../play/source.js';
import { connect, type LineOptions } from './connect.js';
import { CommandError, exitCode } from './exit-code.js';
import { finish } from './finish.js';
import type { Host } from './host.js';
import { actOfKey, faultOfKey, KEYS, statusText } from './kettle-keys.js';

export interface KettleOptions extends LineOptions {
  seed: number;
  fault: Fault[];
  script?: ScriptedAct[];
  /** Ms of simulated time. */
  for?: number;
  setup: KettleOverrides;
}

/** Nothing ends a dry run but this. */
const DRY_RUN_MS = 2 * 3600 * 1000;
const STATUS_EVERY_MS = 250;

/** A kettle that is acted on by keys or by a script. */
export async function kettleCommand(options: KettleOptions, host: Host): Promise<void> {
  const setup = defaultKettle({ ...options.setup, seed: options.seed });
  const run = startOrExplain(() => kettleRun(setup, 0));
  const terminal = options.dryRun ? null : host.terminal;
  // With nobody at the keys a kettle without a script would stand there cold.
  const script = followScript(options.script ?? (terminal ? [] : scriptFromText(DAY)));
  const source = kettleSource(run, script, options.for ?? (options.dryRun ? DRY_RUN_MS : undefined));
  const line = faultyLine(options.fault, options.seed);
  const connection = await connect(options, null, host);
  const stopped = new AbortController();
  const signal = AbortSignal.any([host.signal, stopped.signal]);

  let forgetKeys = () => {};
  if (terminal) {
    host.notice(KEYS);
    forgetKeys = terminal.onKey((key) => {
      if (key === 'q') return stopped.abort();
      const nowMs = Math.max(0, Math.floor(connection.pace().simulatedMs(connection.clock.nowMs())));
      const act = actOfKey(key, run.state);
      const kind = faultOfKey(key);
      if (act) run.act(act, nowMs);
      else if (kind) {
        line.add(fault(kind, nowMs));
        host.notice(`fault: ${kind}`);
      }
    });
    void (async () => {
      while (!signal.aborted) {
        terminal.status(statusText(run.state, readProbe(run.state), connection.forwarder?.waitingCount ?? 0));
        await host.clock.sleep(STATUS_EVERY_MS, signal);
      }
    })();
  }
  try {
    await play({ ...connection, source, line, signal });
  } finally {
    stopped.abort();
    forgetKeys();
    await finish(connection, host);
  }
}

function startOrExplain<Started>(start: () => Started): Started {
  try {
    return start();
  } catch (error) {
    if (error instanceof RangeError) throw new CommandError(error.message, exitCode.usage);
    throw error;
  }
}
