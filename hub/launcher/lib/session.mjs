import { LauncherError } from './launcher-error.mjs';

/**
 * One stay of a launcher: what it has begun is taken back in the reverse order when it ends, however it ends.
 */
export class Session {
  /** @type {(() => unknown)[]} */
  #undo = [];
  #aborter = new AbortController();
  #endedMs = 0;
  /** @type {() => void} */
  #leave = () => {};
  #hasEnded = new Promise((/** @type {(value: void) => void} */ leave) => (this.#leave = leave));

  constructor() {
    // A terminal that is gone must not keep the shutdown from finishing.
    for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
    for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP']))
      process.on(signal, () => {
        if (!this.#aborter.signal.aborted) this.end(0);
        // One Ctrl-C may arrive twice, from the terminal and from npm.
        else if (signal === 'SIGINT' && performance.now() > this.#endedMs + 700)
          this.log('Still stopping; the database finishes its writes first.');
      });
  }

  /** Aborted as soon as the session is to end: steps that take long watch it. */
  get signal() {
    return this.#aborter.signal;
  }

  /** @param {string} line */
  log = (line) => {
    process.stdout.write(`${line}\n`);
  };

  /**
   * @template T
   * @param {T} started
   * @param {(started: T) => unknown} stop
   */
  keep(started, stop) {
    this.#undo.push(() => stop(started));
    return started;
  }

  /**
   * Ends the session because something that it needs has failed.
   * @param {string} sentence
   */
  fail(sentence) {
    if (this.#aborter.signal.aborted) return;
    process.stderr.write(`${sentence}\n`);
    this.end(1);
  }

  /** @param {number} code of this process */
  end(code) {
    process.exitCode = code;
    this.#endedMs = performance.now();
    this.#aborter.abort();
    this.#leave();
  }

  /**
   * Does the work, stays until somebody ends the session, and takes everything back.
   * @param {() => Promise<void>} work
   */
  async run(work) {
    try {
      await work();
      await this.#hasEnded;
    } catch (error) {
      // A step that was interrupted may say so in its own words; the person knows already.
      if (!this.#aborter.signal.aborted) this.#report(error);
    } finally {
      this.#aborter.abort();
      for (const stop of this.#undo.reverse()) {
        try {
          await stop();
        } catch (error) {
          // What is left to stop is stopped all the same.
          this.#report(error);
        }
      }
    }
  }

  /** @param {unknown} error */
  #report(error) {
    process.exitCode = 1;
    if (error instanceof LauncherError) process.stderr.write(`${error.message}\n`);
    else console.error(error);
  }
}
