import { describe, expect, it } from 'vitest';
import { isPublicAddress, publicLookup } from './push-endpoint.js';

describe(isPublicAddress, () => {
  it.each(['8.8.4.4', '172.32.0.1', '2606:4700::1111', '2a00:1450::1'])('is one of the Internet: %s', (address) => {
    expect(isPublicAddress(address)).toBe(true);
  });

  it.each([
    ...['0.0.0.0', '10.1.2.3', '100.64.0.1', '127.0.0.1', '169.254.169.254', '172.16.0.1', '192.168.1.1', '198.18.0.1'],
    ...[
      '224.0.0.1',
      '255.255.255.255',
      '::',
      '::1',
      '::ffff:8.8.4.4',
      '64:ff9b::a00:1',
      'fc00::1',
      'fe80::1',
      'ff02::1',
    ],
    ...['2001::1', '2001:db8::1', '2002:a00:1::1', 'no address'],
  ])('is none of the Internet: %s', (address) => {
    expect(isPublicAddress(address)).toBe(false);
  });
});

describe('a connection to a push service', () => {
  it.each([true, false])(
    'is not made to this machine, whatever its name was when it was checked (all: %s)',
    async (all) => {
      const error = await new Promise((resolve) => publicLookup('localhost', { all }, resolve));
      expect(String(error)).toContain('a network of its own');
    },
  );
});
