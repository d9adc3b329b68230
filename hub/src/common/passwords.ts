import { hash, verify } from '@node-rs/argon2';

// Argon2id with the package's own cost (19 MiB, two passes).
let unknownHash: Promise<string> | undefined;

export function hashPassword(password: string): Promise<string> {
  return hash(password);
}

/**
 * True when the password is the one that was hashed. Without a hash the same work is done for nothing, so that the answer about an
 * unknown address takes as long as any other.
 */
export async function isPasswordRight(password: string, passwordHash: string | null): Promise<boolean> {
  if (passwordHash !== null) return verify(passwordHash, password);
  unknownHash ??= hash('no account has this password');
  await verify(await unknownHash, password);
  return false;
}
