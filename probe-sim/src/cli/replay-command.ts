import { faultyLine, type Fault } from '../faults/index.js';
import { play } from '../play/play.js';
import { traceSource } from '../play/source.js';
import { readTrace } from '../play/trace.js';
import { connect, type LineOptions } from './connect.js';
import { CommandError, exitCode } from './exit-code.js';
import { finish } from './finish.js';
import type { Host } from './host.js';

export interface ReplayOptions extends LineOptions {
  seed: number;
  fault: Fault[];
  /** Stamp of the start of the trace, epoch ms; now when left out. */
  startAt?: number;
}

/** Tells a recorded trace again. */
export async function replayCommand(file: string, options: ReplayOptions, host: Host): Promise<void> {
  const readings = await loadTrace(file, host);
  const connection = await connect(options, options.startAt ?? null, host);
  try {
    await play({
      ...connection,
      source: traceSource(readings),
      line: faultyLine(options.fault, options.seed),
      signal: host.signal,
    });
  } finally {
    await finish(connection, host);
  }
}

async function loadTrace(file: string, host: Host) {
  const text = await host.readFile(file).catch((error: NodeJS.ErrnoException) => {
    const why =
      error.code === 'ENOENT' ? 'there is no such file' : error.code === 'EISDIR' ? 'it is a folder' : error.message;
    throw new CommandError(`Cannot read ${file}: ${why}.`, exitCode.usage);
  });
  try {
    return readTrace(text);
  } catch (error) {
    if (error instanceof RangeError) throw new CommandError(`Cannot use ${file}: ${error.message}`, exitCode.usage);
    throw error;
  }
}
