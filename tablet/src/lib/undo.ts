import { ValueStore } from './value-store.ts';

/** Something that was just done and can be taken back. */
export interface Undoable {
  /** Tells one from the next, also when the words are the same. */
  key: number;
  /** What was done: "Keg B removed." */
  words: string;
  undo: () => Promise<unknown>;
}

/** The newest only: what was done before it can be brought back on its own page. */
export const undoable = new ValueStore<Undoable | null>(null);
let lastKey = 0;

/** Offers to take something back, for a while: `offerUndo('Keg B removed.', () => restore(id))`. */
export function offerUndo(words: string, undo: () => Promise<unknown>): void {
  lastKey += 1;
  undoable.set({ key: lastKey, words, undo });
}

/** Takes the offer away, unless another has come meanwhile. */
export function endUndo(key: number): void {
  if (undoable.get()?.key === key) undoable.set(null);
}
