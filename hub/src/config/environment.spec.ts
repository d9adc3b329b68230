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
});
