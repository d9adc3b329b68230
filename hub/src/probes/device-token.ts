import { newSecret } from '../common/secrets.js';

/**
 * A device token names its probe in front of the secret, as `<id without dashes>.<secret>`: whoever finds one on a slip of paper can tell
 * which probe it opens the door for, and take it away.
 */
export function newDeviceToken(probeId: string): string {
  return `${probeId.replaceAll('-', '')}.${newSecret()}`;
}
