import { stripVTControlCharacters } from 'node:util';
import { describe, expect, it } from 'vitest';
import { lanWords } from './lan-words.mjs';
import { terminalCode } from './terminal-code.mjs';

const facts = {
  origins: ['https://192.168.1.20:4643', 'https://vm.local:4643'],
  guides: ['http://192.168.1.20:4644', 'http://vm.local:4644'],
  sha256: Array<string>(32).fill('AB').join(':'),
  sha1: Array<string>(20).fill('CD').join(':'),
  isNewAuthority: false,
  outside: [],
};

describe(lanWords, () => {
  it('says where to go, where to begin, and the fingerprints', async () => {
    const words = await lanWords(facts, 4643, '/data/tls');
    expect(words).toContain('Steepfall is ready: https://192.168.1.20:4643\n');
    expect(words).toContain('https://localhost:4643');
    expect(words).toContain('how to trust the hub: http://192.168.1.20:4644 or http://vm.local:4644');
    expect(words.match(/AB/g)).toHaveLength(32);
    expect(words.match(/CD/g)).toHaveLength(20);
    expect(words).not.toContain('/data/tls');
  });

  it('says when every tablet has to be walked through it again, and what cannot be reached', async () => {
    const words = await lanWords({ ...facts, isNewAuthority: true, outside: ['203.0.113.7'] }, 4643, '/data/tls');
    expect(words).toContain('every tablet, and this machine, has to trust it once');
    expect(words).toContain('cannot name 203.0.113.7');
    expect(await lanWords({ ...facts, origins: [], guides: [] }, 4643, '/data/tls')).toContain('in no network');
  });
});

describe(terminalCode, () => {
  it('draws light border and dark modules, each line as wide as the others', () => {
    const lines = stripVTControlCharacters(terminalCode('http://192.168.1.20:4644')).split('\n');
    const [first = ''] = lines;
    expect(first.trim()).toBe('');
    expect(new Set(lines.map(({ length }) => length))).toEqual(new Set([first.length]));
    // The border is two lines high; then the first corner, seven modules wide.
    expect(lines[2]).toMatch(/^ {4}█▀▀▀▀▀█ /);
  });
});
