import type { z } from 'zod';

/** A text that this browser keeps under a name; `null` where there is none, or where the browser keeps nothing. */
export function readKept(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
}

/** Keeps a text through a reload, `null` to forget it. False where the browser keeps nothing: it holds until the page is closed then. */
export function keep(key: string, text: string | null): boolean {
  try {
    if (text === null) localStorage.removeItem(key);
    else localStorage.setItem(key, text);
    return true;
  } catch {
    return false;
  }
}

/** A value that was kept as JSON, held against its shape; `null` for anything else, such as what an older build wrote. */
export function readKeptAs<Schema extends z.ZodType>(schema: Schema, key: string): z.output<Schema> | null {
  try {
    const parsed = schema.safeParse(JSON.parse(readKept(key) ?? 'null'));
    return parsed.success ? parsed.data : null;
  } catch {
    return null;
  }
}

/** The same for a value; `null` to forget it. */
export function keepValue(key: string, value: unknown): boolean {
  return keep(key, value === null ? null : JSON.stringify(value));
}
