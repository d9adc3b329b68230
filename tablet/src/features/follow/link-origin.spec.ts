import { describe, expect, it } from 'vitest';
import { linkOrigins } from './link-origin.ts';
import { tokenIn } from './follow-token.ts';

const lan = ['http://192.168.1.20:4680', 'http://10.0.0.5:4680'];

describe(linkOrigins, () => {
  it('keeps to the address of the page when other devices know it', () => {
    const page = { origin: 'https://hops.example.org', hostname: 'hops.example.org' };
    expect(linkOrigins(page, lan)).toEqual({ origins: [page.origin], reach: 'here' });
  });

  it('offers what the hub knows of itself on its own machine, and says when that is nothing', () => {
    const page = { origin: 'http://localhost:4680', hostname: 'localhost' };
    expect(linkOrigins(page, lan)).toEqual({ origins: lan, reach: 'lan' });
    expect(linkOrigins(page, [])).toEqual({ origins: [page.origin], reach: 'own-machine' });
  });
});

describe(tokenIn, () => {
  it('finds the token in a link, after a "#", and alone', () => {
    const token = 'aB3_-'.repeat(8);
    for (const text of [`http://hub:4680/follow#${token}`, `#${token}`, ` ${token}\n`])
      expect(tokenIn(text)).toBe(token);
  });

  it('takes nothing else for one', () => {
    for (const text of ['', '#', 'http://hub:4680/follow', '#short', `#${'a'.repeat(101)}`])
      expect(tokenIn(text)).toBeNull();
  });
});
