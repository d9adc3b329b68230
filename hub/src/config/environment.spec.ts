import { describe, expect, it } from 'vitest';
import { EnvironmentError, readEnvironment } from './environment.js';

const least = { DATABASE_URL: 'mariadb://u:p@127.0.0.1:3306/steepfall', JWT_SECRET: 'x'.repeat(32) };

describe(readEnvironment, () => {
  it('needs little', () => {
    expect(readEnvironment(least)).toMatchObject({
      host: '127.0.0.1',
      port: 4680,
      isDemo: false,
      isProduction: true,
      tabletDist: null,
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

  it('sends no notifications without both keys', () => {
    expect(readEnvironment(least).vapidKeys).toBeNull();
    expect(readEnvironment({ ...least, VAPID_PUBLIC_KEY: 'B'.repeat(87) }).vapidKeys).toBeNull();
  });
});
