/** 99.7 % of deliberate taps last 70 to 400 ms; drops are shorter, a resting hand is longer (Matero and Colley 2012). */
const SHORTEST_MS = 70;
const LONGEST_MS = 500;
/** Water repeats its touch on the same spot. */
const REPEAT_MS = 400;

export type PressVerdict = 'accepted' | 'too-short' | 'too-long' | 'several-touches' | 'repeated' | 'left';

/** Tells a deliberate press on glass from drops, sleeves and palms. One for each control. */
export class PressFilter {
  private pressed: { pointerId: number; atMs: number; isSpoiled: boolean } | null = null;
  private lastAcceptedMs = Number.NEGATIVE_INFINITY;

  get isPressed(): boolean {
    return this.pressed !== null && !this.pressed.isSpoiled;
  }

  /** A finger comes down on the control. `touchCount` counts all fingers on the glass, this one included. */
  down(pointerId: number, atMs: number, touchCount: number): void {
    this.pressed = { pointerId, atMs, isSpoiled: touchCount > 1 || this.pressed !== null };
  }

  /** Another finger came down anywhere. */
  spoil(): void {
    if (this.pressed) this.pressed.isSpoiled = true;
  }

  cancel(): void {
    this.pressed = null;
  }

  up(pointerId: number, atMs: number, isInside: boolean): PressVerdict {
    const { pressed } = this;
    this.pressed = null;
    if (!pressed || pressed.pointerId !== pointerId || pressed.isSpoiled) return 'several-touches';
    if (!isInside) return 'left';
    const lengthMs = atMs - pressed.atMs;
    if (lengthMs < SHORTEST_MS) return 'too-short';
    if (lengthMs >= LONGEST_MS) return 'too-long';
    return this.activate(atMs);
  }

  /** A mouse click, a key or a screen reader: deliberate by nature, but not twice in a blink. */
  activate(atMs: number): PressVerdict {
    if (atMs - this.lastAcceptedMs < REPEAT_MS) return 'repeated';
    this.lastAcceptedMs = atMs;
    return 'accepted';
  }
}
