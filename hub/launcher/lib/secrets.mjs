import { randomBytes } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';

/**
 * A secret that is made once and kept in a file that only its owner can read.
 * @param {string} path
 */
export function keepSecret(path) {
  try {
    const kept = readFileSync(path, 'utf8').trim();
    if (kept.length >= 32) return kept;
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ENOENT') throw error;
  }
  const made = randomBytes(48).toString('base64url');
  writeFileSync(path, `${made}\n`, { mode: 0o600 });
  return made;
}
