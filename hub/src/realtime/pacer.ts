export interface PacerOptions<Message> {
  emit: (key: string, message: Message) => void;
  /** Makes one message of the one that waits and a newer one. */
  merge: (waiting: Message, newer: Message) => Message;
  everyMs: number;
}

interface Window<Message> {
  waiting: Message | null;
  timer: NodeJS.Timeout;
}

/** Hands a message on at once, and what follows on its heels together and not before its time: no more than one a key every `everyMs`. */
export class Pacer<Message> {
  private readonly windows = new Map<string, Window<Message>>();

  constructor(private readonly options: PacerOptions<Message>) {}

  offer(key: string, message: Message): void {
    const { emit, merge } = this.options;
    const window = this.windows.get(key);
    if (window) {
      window.waiting = window.waiting === null ? message : merge(window.waiting, message);
      return;
    }
    this.windows.set(key, { waiting: null, timer: this.open(key) });
    emit(key, message);
  }

  close(): void {
    for (const { timer } of this.windows.values()) clearTimeout(timer);
    this.windows.clear();
  }

  private open(key: string): NodeJS.Timeout {
    return setTimeout(() => {
      const message = this.windows.get(key)?.waiting ?? null;
      this.windows.delete(key);
      if (message !== null) this.offer(key, message);
    }, this.options.everyMs);
  }
}
