import type { NetworkInterfaceInfo } from 'node:os';

type Interfaces = NodeJS.Dict<NetworkInterfaceInfo[]>;

const isLoopback = (host: string) => host === 'localhost' || host === '::1' || host.startsWith('127.');
const isEverywhere = (host: string) => host === '0.0.0.0' || host === '::';

/** Addresses under which other devices of the network reach a hub that listens on this host; none when it keeps to its own machine. */
export function lanOrigins(
  { scheme, host, port }: { scheme: 'http' | 'https'; host: string; port: number },
  interfaces: Interfaces,
): string[] {
  if (isLoopback(host)) return [];
  if (!isEverywhere(host)) return [`${scheme}://${host.includes(':') ? `[${host}]` : host}:${port}`];
  // IPv4: that is what people can type, and every kitchen has it.
  return Object.values(interfaces)
    .flatMap((addresses) => addresses ?? [])
    .filter(({ family, internal }) => family === 'IPv4' && !internal)
    .map(({ address }) => `${scheme}://${address}:${port}`);
}
