/** One thing at a time for each key, in the order asked. */
export class Turns {
  private readonly last = new Map<string, Promise<unknown>>();

  take<Result>(key: string, work: () => Promise<Result>): Promise<Result> {
    const before = this.last.get(key) ?? Promise.resolve();
    const turn = before.then(work, work);
    this.last.set(key, turn);
    const forget = () => {
      if (this.last.get(key) === turn) this.last.delete(key);
    };
    turn.then(forget, forget);
    return turn;
  }
}
