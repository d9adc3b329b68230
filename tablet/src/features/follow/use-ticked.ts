import { useSyncExternalStore } from 'react';
import { subscribeTick } from '#lib/clock/ticker.ts';

/** A text that follows the clock: only a new text wakes the component. */
export function useTicked<Text extends string | null>(read: () => Text): Text {
  return useSyncExternalStore(subscribeTick, read);
}
