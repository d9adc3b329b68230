import { expect, test } from 'vitest';
import { explainDiskError, LauncherError } from './launcher-error.mjs';

const failure = (code: string) => Object.assign(new Error(code), { code, path: '/checkout/.data' });

test.each([
  ['EACCES', '/checkout/.data cannot be written by this user; make it writable, or start as the user who owns it.'],
  ['EROFS', '/checkout/.data cannot be written by this user; make it writable, or start as the user who owns it.'],
  ['ENOTDIR', '/checkout/.data cannot be made, for a file is in its place; move that file away.'],
  ['ENOSPC', 'The disk that holds /checkout is full; free at least 500 MB and start again.'],
])('%s is told in one sentence with the remedy', (code, sentence) => {
  const explained = explainDiskError(failure(code), '/checkout');
  expect(explained).toBeInstanceOf(LauncherError);
  expect(explained).toHaveProperty('message', sentence);
});

test('what is no fault of the disk stays as it is', () => {
  const other = failure('EMFILE');
  expect(explainDiskError(other, '/checkout')).toBe(other);
});
