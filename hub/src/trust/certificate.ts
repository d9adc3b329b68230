import {
  AuthorityKeyIdentifierExtension,
  BasicConstraintsExtension,
  ExtendedKeyUsage,
  ExtendedKeyUsageExtension,
  KeyUsageFlags,
  KeyUsagesExtension,
  SubjectAlternativeNameExtension,
  SubjectKeyIdentifierExtension,
  X509Certificate,
  X509CertificateGenerator,
} from '@peculiar/x509';
import { importKey, keyed, makeKeys, type KeyedCertificate } from './keys.js';
import type { Machine } from './machine.js';

const DAY_MS = 24 * 60 * 60 * 1000;
/** From the first to the last day; some browsers take no more (from memory: 398). */
const CERTIFICATE_DAYS = 397;

/** A certificate of the hub for these names and addresses, with a key of its own, ending no later than the authority does. */
export async function issueCertificate(
  authority: KeyedCertificate,
  { names, addresses }: Machine,
  nowMs: number,
): Promise<KeyedCertificate> {
  const issuer = new X509Certificate(authority.certificate);
  const keys = await makeKeys();
  const notBeforeMs = nowMs - DAY_MS;
  const certificate = await X509CertificateGenerator.create({
    subject: [{ CN: [names[0] ?? 'localhost'] }],
    issuer: issuer.subject,
    publicKey: keys.publicKey,
    signingKey: await importKey(authority.key),
    signingAlgorithm: { name: 'ECDSA', hash: 'SHA-256' },
    notBefore: new Date(notBeforeMs),
    notAfter: new Date(Math.min(notBeforeMs + CERTIFICATE_DAYS * DAY_MS, issuer.notAfter.getTime())),
    extensions: [
      new BasicConstraintsExtension(false, undefined, true),
      new KeyUsagesExtension(KeyUsageFlags.digitalSignature, true),
      new ExtendedKeyUsageExtension([ExtendedKeyUsage.serverAuth]),
      new SubjectAlternativeNameExtension([
        ...names.map((value) => ({ type: 'dns' as const, value })),
        ...addresses.map((value) => ({ type: 'ip' as const, value })),
      ]),
      await AuthorityKeyIdentifierExtension.create(issuer),
      await SubjectKeyIdentifierExtension.create(keys.publicKey),
    ],
  });
  return keyed(certificate, keys);
}

export function readNames(certificate: X509Certificate): Machine {
  const { items } = certificate.getExtension(SubjectAlternativeNameExtension)?.names ?? { items: [] };
  const valuesOf = (wanted: string) => items.filter(({ type }) => type === wanted).map(({ value }) => value);
  return { names: valuesOf('dns'), addresses: valuesOf('ip') };
}
