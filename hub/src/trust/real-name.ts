import { isIP } from 'node:net';

/** Endings that no public authority vouches for (RFC 2606, 6761, 6762, 8375, and `internal`). */
const privateEndings = /(^|\.)(local|localhost|internal|lan|home|home\.arpa|test|example|invalid)$/;

/**
 * A name of the public kind. Only there a browser may be told to come by HTTPS for ever: on a name of the kitchen that would shut out
 * every other port and program of that machine, the page about trusting among them.
 */
export function isRealName(hostname: string): boolean {
  const name = hostname.toLowerCase().replace(/\.$/, '');
  return name.includes('.') && isIP(name) === 0 && !name.startsWith('[') && !privateEndings.test(name);
}
