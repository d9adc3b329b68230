import { mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import webPush from 'web-push';
import { keepKeyPair } from './secrets.mjs';

const folder = mkdtempSync(join(tmpdir(), 'steepfall-keys-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe(keepKeyPair, () => {
  it('makes keys that push services take, once, for its owner only', () => {
    const path = join(folder, 'keys.json');
    const made = keepKeyPair(path);
    const { publicKey, privateKey } = made;
    expect(() => webPush.setVapidDetails('https://hub.example.org', publicKey, privateKey)).not.toThrow();
    expect(keepKeyPair(path)).toEqual(made);
    expect(statSync(path).mode & 0o777).toBe(0o600);
  });

  it('makes new ones in place of a file that was cut off', () => {
    const path = join(folder, 'broken.json');
    writeFileSync(path, '{"publicKey":"B');
    const made = keepKeyPair(path);
    expect(keepKeyPair(path)).toEqual(made);
  });
});
