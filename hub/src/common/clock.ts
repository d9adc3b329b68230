/** Wall time of the hub. Injected wherever a rule depends on it, so that a test can hold it. */
export class Clock {
  nowMs(): number {
    return Date.now();
  }
}
