import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { keep, keepValue, readKept, readKeptAs } from './kept.ts';

const shape = z.object({ name: z.string() });

afterEach(() => vi.restoreAllMocks());

describe('what a browser keeps', () => {
  it('comes back as it was, and is gone when it is forgotten', () => {
    expect(keep('a', 'text')).toBe(true);
    expect(keepValue('b', { name: 'Saaz' })).toBe(true);
    expect([readKept('a'), readKeptAs(shape, 'b')]).toEqual(['text', { name: 'Saaz' }]);
    keep('a', null);
    keepValue('b', null);
    expect([readKept('a'), readKeptAs(shape, 'b')]).toEqual([null, null]);
  });

  it.each(['{', '[]', '{"name":7}', 'null'])('is nothing when it is not what was asked for: %s', (text) => {
    keep('b', text);
    expect(readKeptAs(shape, 'b')).toBeNull();
  });

  it('is nothing, and says so, where the browser keeps nothing', () => {
    const refuse = () => {
      throw new DOMException('full', 'QuotaExceededError');
    };
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(refuse);
    vi.spyOn(Storage.prototype, 'getItem').mockImplementation(refuse);
    expect([keep('a', 'text'), keepValue('b', {}), readKept('a'), readKeptAs(shape, 'b')]).toEqual([
      false,
      false,
      null,
      null,
    ]);
  });
});
