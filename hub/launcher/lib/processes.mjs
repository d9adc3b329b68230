import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readdirSync, readFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';
import { root } from './paths.mjs';
import { LauncherError } from './launcher-error.mjs';

/** @typedef {import('node:child_process').ChildProcess} ChildProcess */

/**
 * Runs a command to its end, with its output on ours.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ isQuiet?: boolean, env?: NodeJS.ProcessEnv }} [options] quiet: output is shown only when the command fails
 * @returns {Promise<void>}
 */
export async function run(command, args, { isQuiet = false, env = process.env } = {}) {
  const code = await runToCode(command, args, { isQuiet, env });
  if (code !== 0)
    throw new LauncherError(`"${[command, ...args].join(' ')}" failed (${code}). Its output above says why.`);
}

/**
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ isQuiet?: boolean, env?: NodeJS.ProcessEnv }} [options]
 * @returns {Promise<number>} the exit code
 */
export async function runToCode(command, args, { isQuiet = false, env = process.env } = {}) {
  const child = spawn(command, args, {
    cwd: root,
    env,
    stdio: ['ignore', isQuiet ? 'pipe' : 'inherit', isQuiet ? 'pipe' : 'inherit'],
  });
  let output = '';
  child.stdout?.on('data', (chunk) => (output += chunk));
  child.stderr?.on('data', (chunk) => (output += chunk));
  const [code] = await once(child, 'close');
  if (code !== 0 && isQuiet) process.stderr.write(output);
  return code ?? 1;
}

/**
 * The standard output of a command.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {NodeJS.ProcessEnv} [env]
 * @returns {Promise<string>}
 */
export async function outputOf(command, args, env = process.env) {
  const child = spawn(command, args, { cwd: root, env, stdio: ['ignore', 'pipe', 'inherit'] });
  let output = '';
  child.stdout.on('data', (chunk) => (output += chunk));
  const [code] = await once(child, 'close');
  if (code !== 0)
    throw new LauncherError(`"${[command, ...args].join(' ')}" failed (${code}). Its output above says why.`);
  return output;
}

/**
 * Stops one process that we started: asks first, insists later.
 *
 * @param {ChildProcess} child
 * @param {{ patienceMs?: number }} [options]
 */
export async function stopChild(child, { patienceMs = 15_000 } = {}) {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = once(child, 'exit');
  child.kill('SIGTERM');
  const isPatient = await Promise.race([ended.then(() => false), sleep(patienceMs, true, { ref: false })]);
  if (!isPatient) return;
  child.kill('SIGKILL');
  await ended;
}

/**
 * @param {number} pid
 * @returns {boolean}
 */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
    // A zombie still has an id and does nothing any more.
    return !/^State:\s+Z/m.test(readFileSync(`/proc/${pid}/status`, 'utf8'));
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM';
  }
}

/**
 * What tells a process from a later one with the same id: the moment it started.
 * @param {number} pid
 * @returns {string | null} null when there is no such process
 */
export function startMark(pid) {
  try {
    // The name in parentheses may hold spaces; the start time is the twentieth field after it.
    return (
      readFileSync(`/proc/${pid}/stat`, 'utf8')
        .replace(/^.*\) /s, '')
        .split(' ')[19] ?? null
    );
  } catch {
    return null;
  }
}

/**
 * @param {string} argument
 * @returns {number[]} processes that were started with exactly this argument
 */
export function findByArgument(argument) {
  return readdirSync('/proc')
    .map(Number)
    .filter((pid) => pid > 0 && pid !== process.pid && argumentsOf(pid).includes(argument) && isAlive(pid));
}

/**
 * @param {number} pid
 * @returns {string[]}
 */
function argumentsOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0');
  } catch {
    return [];
  }
}

/**
 * Ends one process by its id: asks first, insists after the grace.
 * @param {number} pid
 * @param {number} graceMs
 */
export async function endProcess(pid, graceMs) {
  const mark = startMark(pid);
  const isThere = () => isAlive(pid) && startMark(pid) === mark;
  for (const signal of /** @type {const} */ (['SIGTERM', 'SIGKILL'])) {
    if (!isThere()) return;
    process.kill(pid, signal);
    for (let waitedMs = 0; isThere() && waitedMs < graceMs; waitedMs += 50) await sleep(50);
  }
}
