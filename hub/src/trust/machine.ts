import type { NetworkInterfaceInfo } from 'node:os';

type Interfaces = NodeJS.Dict<NetworkInterfaceInfo[]>;

/** What other devices call this machine. */
export interface Machine {
  /** The one that most devices understand first; `localhost` last. */
  names: string[];
  /** IPv4 and the two of the machine itself. IPv6 ones change by the day, and who comes over IPv6 comes by a name. */
  addresses: string[];
}

const isName = (name: string) => /^[a-z0-9]([a-z0-9-]*[a-z0-9])?(\.[a-z0-9]([a-z0-9-]*[a-z0-9])?)*$/.test(name);

export function describeMachine(hostname: string, interfaces: Interfaces): Machine {
  const full = hostname.toLowerCase();
  const [label = ''] = full.split('.');
  const own = Object.values(interfaces)
    .flatMap((addresses) => addresses ?? [])
    .filter(({ family, internal, address }) => family === 'IPv4' && !internal && !address.startsWith('169.254.'))
    .map(({ address }) => address);
  return {
    names: [...new Set([`${label}.local`, label, full, 'localhost'])].filter(isName),
    addresses: [...new Set([...own.sort(), '127.0.0.1', '::1'])],
  };
}

/** Those that lead here from another device. */
export function reachableFrom({ names, addresses }: Machine): string[] {
  return [...addresses.filter((address) => address !== '127.0.0.1' && address !== '::1'), ...names.slice(0, 1)].filter(
    (host) => host !== 'localhost',
  );
}
