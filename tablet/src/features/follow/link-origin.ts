/** Where the links of this page lead, and what there is to say about it. */
export interface LinkOrigins {
  /** The first is offered. */
  origins: string[];
  /** `own-machine`: no phone reaches what is offered. */
  reach: 'here' | 'lan' | 'own-machine';
}

function isOwnMachine(hostname: string): boolean {
  return hostname === 'localhost' || hostname === '[::1]' || hostname.startsWith('127.');
}

/** A page that is open on the hub's own machine knows an address that only that machine understands. */
export function linkOrigins(page: Pick<Location, 'origin' | 'hostname'>, lanOrigins: readonly string[]): LinkOrigins {
  if (!isOwnMachine(page.hostname)) return { origins: [page.origin], reach: 'here' };
  if (lanOrigins.length > 0) return { origins: [...lanOrigins], reach: 'lan' };
  return { origins: [page.origin], reach: 'own-machine' };
}
