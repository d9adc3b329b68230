import { ValueStore } from './value-store.ts';

/** The run somebody wants to follow on a phone; `null` while nobody asks. Whoever asks need not know what answers. */
export const followAsked = new ValueStore<string | null>(null);
