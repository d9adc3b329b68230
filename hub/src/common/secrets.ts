import { createHash, randomBytes } from 'node:crypto';

/** A token that nobody guesses: 256 bits, in characters that need no quoting. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url');
}

/** What the database keeps of a token. The token has enough entropy of its own: no salt, no slow hash. */
export function hashSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}
