import type { WallClock } from '../clock/index.js';

/** What a command is given of the machine. */
export interface Host {
  write(text: string): void;
  /** For notices; never mixed with what is written. */
  notice(text: string): void;
  clock: WallClock;
  random(): number;
  readFile(path: string): Promise<string>;
  /** Aborts on Ctrl-C and on "terminate". */
  signal: AbortSignal;
  /** Keys of a terminal as they are pressed; null when nobody sits there. */
  terminal: Terminal | null;
}

export interface Terminal {
  /** Returns how to stop listening. */
  onKey(listen: (key: string) => void): () => void;
  /** Draws over the status line. */
  status(text: string): void;
}
