import type { X509Certificate } from '@peculiar/x509';
import { KeyObject, createPrivateKey, webcrypto } from 'node:crypto';

/** Both as PEM. */
export interface KeyedCertificate {
  certificate: string;
  key: string;
}

/** P-256: every tablet of today knows it, and it is made in a moment. */
const algorithm = { name: 'ECDSA', namedCurve: 'P-256', hash: 'SHA-256' };

export function makeKeys(): Promise<webcrypto.CryptoKeyPair> {
  return webcrypto.subtle.generateKey(algorithm, true, ['sign', 'verify']) as Promise<webcrypto.CryptoKeyPair>;
}

export function keyed(certificate: X509Certificate, { privateKey }: webcrypto.CryptoKeyPair): KeyedCertificate {
  return {
    certificate: `${certificate.toString('pem')}
`,
    key: KeyObject.from(privateKey).export({ type: 'pkcs8', format: 'pem' }).toString(),
  };
}

export function importKey(pem: string): Promise<webcrypto.CryptoKey> {
  const der = createPrivateKey(pem).export({ type: 'pkcs8', format: 'der' });
  return webcrypto.subtle.importKey('pkcs8', der, algorithm, false, ['sign']);
}
