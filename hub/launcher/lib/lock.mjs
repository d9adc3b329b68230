import { linkSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { isAlive, startMark } from './processes.mjs';

/**
 * Takes a lock that ends with the process that holds it, however that process ends.
 * @param {string} path the lock file; its folder exists
 * @returns {{ isTaken: true, release: () => void } | { isTaken: false, pid: number }}
 */
export function takeLock(path) {
  const own = `${path}.${process.pid}`;
  writeFileSync(own, JSON.stringify({ pid: process.pid, startMark: startMark(process.pid) }), { mode: 0o600 });
  try {
    for (;;) {
      try {
        // A hard link appears whole or not at all: nobody reads a lock that is half written.
        linkSync(own, path);
        return { isTaken: true, release: () => release(path) };
      } catch (error) {
        if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'EEXIST') throw error;
        const holder = readHolder(path);
        if (holder && isAlive(holder.pid) && startMark(holder.pid) === holder.startMark)
          return { isTaken: false, pid: holder.pid };
        rmSync(path, { force: true });
      }
    }
  } finally {
    rmSync(own, { force: true });
  }
}

/**
 * Gives back what is still ours: after a first release the lock may be somebody else's.
 * @param {string} path
 */
function release(path) {
  if (readHolder(path)?.pid === process.pid) rmSync(path, { force: true });
}

/**
 * @param {string} path
 * @returns {{ pid: number, startMark: string | null } | null}
 */
function readHolder(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch {
    return null;
  }
}
