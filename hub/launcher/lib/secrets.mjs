import { createECDH, randomBytes } from 'node:crypto';
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

/**
 * The pair of keys by which push services know this hub (P-256, RFC 8292), made once and kept like a secret. Phones subscribe to the public
 * one: with a new pair they would all have to subscribe again.
 * @param {string} path
 * @returns {{ publicKey: string, privateKey: string }} in base64url
 */
export function keepKeyPair(path) {
  try {
    const kept = JSON.parse(readFileSync(path, 'utf8'));
    if (/^[\w-]{87}$/.test(kept?.publicKey) && /^[\w-]{43}$/.test(kept?.privateKey)) return kept;
  } catch (error) {
    if (!(error instanceof SyntaxError) && /** @type {NodeJS.ErrnoException} */ (error).code !== 'ENOENT') throw error;
  }
  const pair = createECDH('prime256v1');
  const publicKey = pair.generateKeys('base64url');
  // Without its leading zeros a key now and then is a byte short.
  const privateKey = Buffer.from(pair.getPrivateKey('hex').padStart(64, '0'), 'hex').toString('base64url');
  writeFileSync(path, `${JSON.stringify({ publicKey, privateKey })}\n`, { mode: 0o600 });
  return { publicKey, privateKey };
}
