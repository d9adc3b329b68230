import { AsnConvert } from '@peculiar/asn1-schema';
import {
  GeneralName,
  GeneralSubtree,
  GeneralSubtrees,
  id_ce_nameConstraints,
  NameConstraints,
} from '@peculiar/asn1-x509';
import {
  BasicConstraintsExtension,
  Extension,
  KeyUsageFlags,
  KeyUsagesExtension,
  SubjectKeyIdentifierExtension,
  X509CertificateGenerator,
  type X509Certificate,
} from '@peculiar/x509';
import { BlockList, isIPv4 } from 'node:net';
import { keyed, makeKeys, type KeyedCertificate } from './keys.js';
import type { Machine } from './machine.js';

const DAY_MS = 24 * 60 * 60 * 1000;
/** Each tablet has to be walked through trusting a new one, so it lives long: ten years. */
const AUTHORITY_DAYS = 3652;

/** The networks of houses: private use (RFC 1918, RFC 4193), the machine itself, link-local, shared by a carrier or a mesh (RFC 6598). */
const houseNetworks = [
  '10.0.0.0/8',
  '172.16.0.0/12',
  '192.168.0.0/16',
  '169.254.0.0/16',
  '100.64.0.0/10',
  '127.0.0.0/8',
  'fc00::/7',
  'fe80::/10',
  '::1/128',
];

/** What an authority may speak for: `local` stands for every name below it. */
export interface Scope {
  names: string[];
  networks: string[];
}

export function scopeOf({ names, addresses }: Machine): Scope {
  const outside = addresses.filter((address) => !isAddressIn(houseNetworks, address));
  return {
    names: ['local', ...names.filter((name) => !isNameIn(['local'], name))],
    networks: [...houseNetworks, ...outside.map((address) => `${address}/${isIPv4(address) ? 32 : 128}`)],
  };
}

/** The part of the names and addresses that lies in the scope, and the rest: one name outside spoils a whole certificate. */
export function within(scope: Scope, { names, addresses }: Machine): { inside: Machine; outside: string[] } {
  const isIn = (name: string) => isNameIn(scope.names, name);
  const isNear = (address: string) => isAddressIn(scope.networks, address);
  return {
    inside: { names: names.filter(isIn), addresses: addresses.filter(isNear) },
    outside: [...names.filter((name) => !isIn(name)), ...addresses.filter((address) => !isNear(address))],
  };
}

function isNameIn(names: readonly string[], name: string): boolean {
  return names.some((allowed) => name === allowed || name.endsWith(`.${allowed}`));
}

function isAddressIn(networks: readonly string[], address: string): boolean {
  const list = new BlockList();
  const familyOf = (ip: string) => (isIPv4(ip) ? 'ipv4' : 'ipv6');
  for (const network of networks) {
    const [base = '', bits] = network.split('/');
    list.addSubnet(base, Number(bits), familyOf(base));
  }
  return list.check(address, familyOf(address));
}

/**
 * A certificate authority for this machine alone. Its name tells it from an earlier one on a tablet that trusted both.
 * The limits are not marked critical: what knows them keeps to them all the same, and older Apple systems refuse the mark.
 */
export async function makeAuthority(machine: Machine, nowMs: number): Promise<KeyedCertificate> {
  const keys = await makeKeys();
  const day = new Date(nowMs).toISOString().slice(0, 10);
  const certificate = await X509CertificateGenerator.createSelfSigned({
    name: [{ CN: [`Steepfall on ${machine.names.at(1) ?? 'localhost'}, ${day}`] }, { O: ['Steepfall'] }],
    keys,
    // Clocks of tablets are off now and then.
    notBefore: new Date(nowMs - DAY_MS),
    notAfter: new Date(nowMs + AUTHORITY_DAYS * DAY_MS),
    signingAlgorithm: { name: 'ECDSA', hash: 'SHA-256' },
    extensions: [
      new BasicConstraintsExtension(true, 0, true),
      new KeyUsagesExtension(KeyUsageFlags.keyCertSign | KeyUsageFlags.cRLSign, true),
      await SubjectKeyIdentifierExtension.create(keys.publicKey),
      new Extension(id_ce_nameConstraints, false, AsnConvert.serialize(constraintsOf(scopeOf(machine)))),
    ],
  });
  return keyed(certificate, keys);
}

function constraintsOf({ names, networks }: Scope): NameConstraints {
  const bases = [
    ...names.map((dNSName) => new GeneralName({ dNSName })),
    ...networks.map((iPAddress) => new GeneralName({ iPAddress })),
  ];
  return new NameConstraints({
    permittedSubtrees: new GeneralSubtrees(bases.map((base) => new GeneralSubtree({ base }))),
  });
}

/** What is written in an authority's certificate. */
export function readScope(certificate: X509Certificate): Scope {
  const extension = certificate.getExtension(id_ce_nameConstraints);
  const { permittedSubtrees = [] } = extension ? AsnConvert.parse(extension.value, NameConstraints) : {};
  const bases = [...permittedSubtrees].map(({ base }) => base);
  return {
    names: bases.flatMap(({ dNSName }) => dNSName ?? []),
    networks: bases.flatMap(({ iPAddress }) => iPAddress ?? []),
  };
}
