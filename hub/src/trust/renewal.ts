import type { Machine } from './machine.js';

const DAY_MS = 24 * 60 * 60 * 1000;
/** Time enough for a kitchen that is shut for a while. */
const RENEW_BEFORE_MS = 30 * DAY_MS;

export interface Validity {
  notBeforeMs: number;
  notAfterMs: number;
}

export type RenewalReason = 'not-yet-valid' | 'ending' | 'names-changed';

/** Why something that is valid for a while has to be made anew; null when it has not. A clock that was set back counts. */
export function validityReason({ notBeforeMs, notAfterMs }: Validity, nowMs: number): RenewalReason | null {
  if (nowMs < notBeforeMs) return 'not-yet-valid';
  return nowMs > notAfterMs - RENEW_BEFORE_MS ? 'ending' : null;
}

/** The same of a certificate. A name or an address that the machine has lost may stay in it until then: it may come back in an hour. */
export function renewalReason(certificate: Validity & Machine, wanted: Machine, nowMs: number): RenewalReason | null {
  const isMissing =
    wanted.names.some((name) => !certificate.names.includes(name)) ||
    wanted.addresses.some((address) => !certificate.addresses.includes(address));
  return validityReason(certificate, nowMs) ?? (isMissing ? 'names-changed' : null);
}
