import type { Workings } from './types.js';

/** How each figure is worked out, by the key of its row. */
export const workings: Readonly<Record<string, Workings>> = {};
