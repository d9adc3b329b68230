import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readdirSync, readFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';
import { root } from './paths.mjs';
import { findProgram } from './programs.mjs';

/** @typedef {import('node:child_process').ChildProcess} ChildProcess */

/**
 * Runs a command to its end.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {object} [options]
 * @param {boolean} [options.isQuiet] its output is returned instead of shown
 * @param {NodeJS.ProcessEnv} [options.env]
 * @param {AbortSignal} [options.signal] ends the command early
 * @returns {Promise<{ code: number, stdout: string, output: string }>} `output` holds both streams as they came
 */
export async function run(command, args, { isQuiet = false, env = process.env, signal } = {}) {
  const stream = isQuiet ? 'pipe' : 'inherit';
  const child = spawn(...endingWithParent(command, args), {
    cwd: root,
    env,
    stdio: ['ignore', stream, stream],
    signal,
  });
  let stdout = '';
  let output = '';
  child.stdout?.on('data', (chunk) => {
    stdout += chunk;
    output += chunk;
  });
  child.stderr?.on('data', (chunk) => (output += chunk));
  child.on('error', (error) => (output += `${error.message}\n`));
  // `close` follows an `error` as well, and after it nothing of the command is left; waiting with `once` would end at the error.
  const code = await new Promise((/** @type {(code: number | null) => void} */ closed) => child.on('close', closed));
  return { code: code ?? 1, stdout, output };
}

/**
 * What goes before a program so that the system asks it to end when the process that started it is killed without a
 * chance to do so. Where the tool is missing, the next start finds what was left behind.
 * @param {string} program
 * @param {readonly string[]} args
 * @returns {[string, string[]]}
 */
export function endingWithParent(program, args) {
  const setpriv = findProgram(['setpriv']);
  return setpriv ? [setpriv, ['--pdeathsig', 'TERM', program, ...args]] : [program, [...args]];
}

/**
 * Ends a child of ours: asks first, insists after the grace.
 * @param {ChildProcess} child
 * @param {number} graceMs
 */
export async function endChild(child, graceMs) {
  if (hasEnded(child)) return;
  const ended = once(child, 'exit');
  child.kill('SIGTERM');
  const insist = setTimeout(() => child.kill('SIGKILL'), graceMs);
  await ended;
  clearTimeout(insist);
}

/** @param {ChildProcess} child */
export function hasEnded(child) {
  return child.pid === undefined || child.exitCode !== null || child.signalCode !== null;
}

/**
 * Ends a process that is no child of ours, by its id: asks first, insists after the grace.
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

/**
 * Whether a process runs; one that has ended and waits to be collected does not.
 * @param {number} pid
 */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EPERM') return false;
  }
  return statFields(pid)?.[0] !== 'Z';
}

/**
 * What tells a process from a later one with the same id: the moment it started.
 * @param {number} pid
 * @returns {string | null} null when there is no such process, or no /proc
 */
export function startMark(pid) {
  return statFields(pid)?.[19] ?? null;
}

/**
 * The fields of /proc/PID/stat after the name of the command, which may itself hold blanks and brackets.
 * @param {number} pid
 */
function statFields(pid) {
  try {
    return readFileSync(`/proc/${pid}/stat`, 'latin1')
      .replace(/^.*\) /s, '')
      .split(' ');
  } catch {
    return null;
  }
}

/**
 * The processes that were started with exactly this argument.
 * @param {string} argument
 * @returns {number[]}
 */
export function findByArgument(argument) {
  /** @type {string[]} */
  let entries = [];
  try {
    entries = readdirSync('/proc');
  } catch {
    // No /proc on this system: leftovers are not found, and the lock of the database files tells of them instead.
  }
  return entries
    .map(Number)
    .filter((pid) => pid > 0 && pid !== process.pid && argumentsOf(pid).includes(argument) && isAlive(pid));
}

/** @param {number} pid */
function argumentsOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0');
  } catch {
    return [];
  }
}
