import { describe, expect, it } from 'vitest';
import { EnvironmentError, readEnvironment } from './environment.js';

const least = { DATABASE_URL: 'mariadb://u:p@127.0.0.1:3306/steepfall', JWT_SECRET: 'x'.repeat(32) };

describe(readEnvironment, () => {
  it('needs little', () => {
    expect(readEnvironment(least)).toMatchObject({
      host: '127.0.0.1',
      port: 4680,
      isDemo: false,
      tabletDist: null,
      lan: null,
      trustedProxies: false,
      publicOrigin: null,
      logLevels: ['fatal', 'error', 'warn', 'log'],
    });
  });

  it('names everything that is wrong', () => {
    const read = () =>
      readEnvironment({ DATABASE_URL: 'postgres://x/y', PORT: '70000', DEMO: 'yes', JWT_SECRET: 'short' });
    expect(read).toThrow(EnvironmentError);
    for (const name of ['DATABASE_URL', 'PORT', 'DEMO', 'JWT_SECRET']) expect(read).toThrow(name);
    expect(read).not.toThrow('short;');
  });

  it('takes a contact for push services that they take as well', () => {
    const read = (PUSH_CONTACT: string) => readEnvironment({ ...least, PUSH_CONTACT }).pushContact;
    expect(read('mailto:kitchen@brewers.org')).toBe('mailto:kitchen@brewers.org');
    for (const odd of ['kitchen@brewers.org', 'mailto:me@localhost', 'https://hub.local', 'http://brewers.org'])
      expect(() => read(odd)).toThrow('PUSH_CONTACT');
  });

  it('believes as many proxies as it is told, or those that are named', () => {
    const read = (TRUST_PROXY: string) => readEnvironment({ ...least, TRUST_PROXY }).trustedProxies;
    for (const none of ['', 'off']) expect(read(none)).toBe(false);
    expect(read('on')).toBe(1);
    expect(read('2')).toBe(2);
    expect(read('10.0.0.5, fd00::/8')).toEqual(['10.0.0.5', 'fd00::/8']);
    for (const odd of ['true', '0', '10', 'kitchen', '10.0.0.0/33', '10.0.0.5,', '10.0.0.0/8/8', '*'])
      expect(() => read(odd), odd).toThrow('TRUST_PROXY');
  });

  it('takes the address that people use, without a path', () => {
    const read = (PUBLIC_ORIGIN: string) => readEnvironment({ ...least, PUBLIC_ORIGIN }).publicOrigin;
    expect(read('https://hub.brewhouse.org')).toBe('https://hub.brewhouse.org');
    expect(read('https://HUB.brewhouse.org:8443/')).toBe('https://hub.brewhouse.org:8443');
    for (const odd of ['hub.brewhouse.org', 'https://x.org/steepfall', 'ftp://x.org', 'https://me@x.org'])
      expect(() => read(odd), odd).toThrow('PUBLIC_ORIGIN');
  });

  it('serves the network of the house when it has a folder for certificates', () => {
    expect(readEnvironment({ ...least, TLS_FOLDER: '/data/tls' }).lan).toEqual({
      folder: '/data/tls',
      guidePort: 4644,
    });
  });

  it('sends no notifications without both keys', () => {
    expect(readEnvironment(least).vapidKeys).toBeNull();
    expect(readEnvironment({ ...least, VAPID_PUBLIC_KEY: 'B'.repeat(87) }).vapidKeys).toBeNull();
  });
});
