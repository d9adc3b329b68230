import type { DeviceActor } from './actor.js';

/** Who knows the tokens of the probes. The guard asks for it by this class; the probes feature provides it. */
export abstract class DeviceAuthenticator {
  /** The probe of this token, or `null` when the token is unknown or revoked. */
  abstract authenticate(deviceToken: string): Promise<DeviceActor | null>;
}
