#!/usr/bin/env node
import { readFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { emitKeypressEvents } from 'node:readline';
import { exitCode } from './cli/exit-code.js';
import type { Host, Terminal } from './cli/host.js';
import { runProgram } from './cli/program.js';
import { systemClock } from './clock/index.js';

const stopping = new AbortController();
for (const name of ['SIGINT', 'SIGTERM'] as const) process.once(name, () => stopping.abort());
// The reader of a pipe may have seen enough.
process.stdout.on('error', (error: NodeJS.ErrnoException) => process.exit(error.code === 'EPIPE' ? 0 : 1));

let hasStatus = false;
const clearStatus = () => {
  if (hasStatus) process.stderr.write('\r\x1b[K');
  hasStatus = false;
};

function openTerminal(): Terminal | null {
  const { stdin, stderr } = process;
  if (!stdin.isTTY || !stderr.isTTY) return null;
  return {
    onKey(listen) {
      const onKeypress = (_: string | undefined, key: { sequence?: string; name?: string; ctrl?: boolean }) => {
        // In raw mode the terminal no longer turns Ctrl-C into a signal.
        if (key.ctrl && key.name === 'c') stopping.abort();
        else listen(key.sequence ?? '');
      };
      emitKeypressEvents(stdin);
      stdin.setRawMode(true).resume();
      stdin.on('keypress', onKeypress);
      return () => {
        stdin.off('keypress', onKeypress);
        stdin.setRawMode(false).pause();
      };
    },
    status(text) {
      stderr.write(`\r${text}\x1b[K`);
      hasStatus = true;
    },
  };
}

const host: Host = {
  write: (text) => process.stdout.write(text),
  notice(text) {
    clearStatus();
    process.stderr.write(`${text}\n`);
  },
  clock: systemClock,
  random: Math.random,
  // npm runs scripts in the folder of the package; people name files from where they are.
  readFile: (path) => readFile(resolve(process.env['INIT_CWD'] ?? process.cwd(), path), 'utf8'),
  signal: stopping.signal,
  terminal: openTerminal(),
};

try {
  process.exitCode = await runProgram(process.argv.slice(2), host);
} catch (error) {
  host.notice(`Unexpected: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
  process.exitCode = exitCode.unexpected;
}
