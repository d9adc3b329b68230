import { keep, readKept } from '#lib/kept.ts';

const KEY = 'steepfall.follow';
const shape = /^[\w-]{20,100}$/;

/** The token of a link, of the whole link, or of its end; `null` when it is none. */
export function tokenIn(text: string): string | null {
  const token = text.trim().split('#').at(-1) ?? '';
  return shape.test(token) ? token : null;
}

/** The link this phone was opened with, or the one it followed last: a notification opens the page without it. */
export function readToken(hash: string): string | null {
  const token = tokenIn(hash);
  if (token) keep(KEY, token);
  return token ?? tokenIn(readKept(KEY) ?? '');
}

export function forgetToken(): void {
  keep(KEY, null);
}
