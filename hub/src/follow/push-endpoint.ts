import { lookup, type LookupAddress } from 'node:dns';
import { BlockList, isIP, isIPv4, type LookupFunction } from 'node:net';
import { ProblemError } from '@steepfall/shared/problems';

const notPublic = new BlockList();
// IANA special-purpose registries: this network, private, shared, loopback, link-local, documentation, benchmark, multicast, reserved.
for (const [network, prefix] of [
  ['0.0.0.0', 8],
  ['10.0.0.0', 8],
  ['100.64.0.0', 10],
  ['127.0.0.0', 8],
  ['169.254.0.0', 16],
  ['172.16.0.0', 12],
  ['192.0.0.0', 24],
  ['192.0.2.0', 24],
  ['192.88.99.0', 24],
  ['192.168.0.0', 16],
  ['198.18.0.0', 15],
  ['198.51.100.0', 24],
  ['203.0.113.0', 24],
  ['224.0.0.0', 3],
] as const)
  notPublic.addSubnet(network, prefix, 'ipv4');
// Inside global unicast: Teredo and other protocol assignments, documentation, 6to4, which leads to any IPv4 address.
for (const [network, prefix] of [
  ['2001::', 23],
  ['2001:db8::', 32],
  ['2002::', 16],
  ['3fff::', 20],
] as const)
  notPublic.addSubnet(network, prefix, 'ipv6');
const globalUnicast = new BlockList();
globalUnicast.addSubnet('2000::', 3, 'ipv6');

/** Whether an address is one of the open Internet, and not of this machine or its network. */
export function isPublicAddress(address: string): boolean {
  if (isIPv4(address)) return !notPublic.check(address, 'ipv4');
  return globalUnicast.check(address, 'ipv6') && !notPublic.check(address, 'ipv6');
}

const refusal = (detail: string) =>
  new ProblemError('not-valid', 'One field does not fit.', { errors: [{ pointer: '/endpoint', detail }] });

/**
 * Refuses to send anywhere but to a push service on the Internet: an address that a phone hands in must not make the hub call machines of
 * its own network.
 *
 * @param addressesOf every address of a name; throws when the name is not known.
 */
export async function refuseOddEndpoint(
  endpoint: string,
  addressesOf: (hostname: string) => Promise<string[]>,
): Promise<void> {
  const { protocol, hostname, port, username, password } = new URL(endpoint);
  const name = hostname.replace(/^\[|\]$|\.$/g, '');
  if (protocol !== 'https:' || port !== '' || username !== '' || password !== '')
    throw refusal('Notifications go through an https address, without a port and without a password.');
  if (isIP(name) !== 0 || !name.includes('.')) throw refusal('Notifications go through a push service with a name.');
  let addresses: string[];
  try {
    addresses = await addressesOf(name);
  } catch {
    throw new ProblemError(
      'unavailable',
      'The hub does not find the push service of this phone. Is it connected to the Internet?',
    );
  }
  if (addresses.length === 0 || !addresses.every(isPublicAddress))
    throw refusal('This leads into a network of its own, where no push service is.');
}

/** Looks a name up for a connection, and refuses one that leads anywhere but the Internet: names can change after they were checked. */
export const publicLookup: LookupFunction = (hostname, options, callback) => {
  lookup(hostname, options, (error, found: string | LookupAddress[], family) => {
    const addresses = typeof found === 'string' ? [found] : (found ?? []).map(({ address }) => address);
    const isOdd = !error && !addresses.every(isPublicAddress);
    callback(isOdd ? new Error(`${hostname} leads into a network of its own.`) : error, found, family);
  });
};
