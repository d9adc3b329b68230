import type { NetworkInterfaceInfo } from 'node:os';
import { describe, expect, it } from 'vitest';
import { lanOrigins } from './lan-origins.js';

const one = (address: string, family: 'IPv4' | 'IPv6', internal = false) =>
  ({ address, family, internal }) as NetworkInterfaceInfo;
const interfaces = {
  lo: [one('127.0.0.1', 'IPv4', true)],
  eth0: [one('192.168.1.20', 'IPv4'), one('fe80::1', 'IPv6')],
};

describe(lanOrigins, () => {
  it('knows none for a hub that keeps to its own machine', () => {
    for (const host of ['127.0.0.1', 'localhost', '::1'])
      expect(lanOrigins({ scheme: 'http', host, port: 4680 }, interfaces)).toEqual([]);
  });

  it('names every address of a hub that listens everywhere, and the one of a hub that listens on one', () => {
    expect(lanOrigins({ scheme: 'https', host: '0.0.0.0', port: 4680 }, interfaces)).toEqual([
      'https://192.168.1.20:4680',
    ]);
    expect(lanOrigins({ scheme: 'http', host: '192.168.1.20', port: 80 }, interfaces)).toEqual([
      'http://192.168.1.20:80',
    ]);
  });
});
