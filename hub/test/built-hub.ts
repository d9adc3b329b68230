import { spawn, type ChildProcessWithoutNullStreams } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { testEnvironment } from './create-test-app.js';

const main = join(import.meta.dirname, '../dist/main.js');
const started = new Set<ChildProcessWithoutNullStreams>();

export interface HubLine {
  event?: string;
  port?: number;
  reason?: string;
  detail?: string;
}

export interface BuiltHub {
  child: ChildProcessWithoutNullStreams;
  /** Its first line that says how it went. */
  line: HubLine;
  url: string;
}

/** Starts the hub as it is shipped, in a process of its own, and waits until it says how that went. */
export async function startBuiltHub(variables: Record<string, string>): Promise<BuiltHub> {
  const env = { PATH: process.env['PATH'], ...testEnvironment, ...variables };
  const child = spawn(process.execPath, [main], { env });
  started.add(child);
  for await (const text of createInterface({ input: child.stdout })) {
    const line = JSON.parse(text) as HubLine;
    if (line.event !== 'hub.listening' && line.event !== 'hub.failed') continue;
    // A pipe that nobody reads would hold the hub up once it is full.
    child.stdout.resume();
    child.stderr.resume();
    return { child, line, url: `http://127.0.0.1:${line.port}` };
  }
  throw new Error('The hub said nothing.');
}

/** No chance to say goodbye: as when somebody pulls the plug. */
export async function killHub({ child }: Pick<BuiltHub, 'child'>): Promise<void> {
  started.delete(child);
  if (child.exitCode !== null || child.signalCode !== null) return;
  child.kill('SIGKILL');
  await once(child, 'exit');
}

/** Ends every hub that this spec file has started. */
export async function killHubs(): Promise<void> {
  for (const child of [...started]) await killHub({ child });
}
