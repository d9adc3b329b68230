import { useEffect, useMemo, useRef, useState, type MouseEvent, type PointerEvent } from 'react';
import { PressFilter, type PressVerdict } from './press-filter.ts';

const touches = new Set<number>();
const filters = new Set<PressFilter>();
let isCounting = false;
/** When a touch was last judged, until the next one begins. */
let judgedAtMs = Number.NEGATIVE_INFINITY;
const CLICK_FOLLOWS_WITHIN_MS = 800;

/** Fingers on the glass are counted for the whole page: a palm beside the button spoils the press on it. */
function countTouches(): void {
  if (isCounting) return;
  isCounting = true;
  const capture = { capture: true, passive: true };
  addEventListener(
    'pointerdown',
    ({ pointerType, pointerId, isPrimary }) => {
      judgedAtMs = Number.NEGATIVE_INFINITY;
      if (pointerType !== 'touch') return;
      // The first finger on an empty glass: what is still counted was lifted where nobody saw it.
      if (isPrimary) forgetTouches();
      touches.add(pointerId);
      if (touches.size > 1) for (const filter of filters) filter.spoil();
    },
    capture,
  );
  const lift = ({ pointerId }: globalThis.PointerEvent) => touches.delete(pointerId);
  addEventListener('pointerup', lift, capture);
  addEventListener('pointercancel', lift, capture);
  addEventListener('blur', forgetTouches);
  document.addEventListener('visibilitychange', forgetTouches);
  // A touch is judged when the finger lifts, and its click comes after: by then something else may be under the finger.
  addEventListener(
    'click',
    (event) => {
      if (event.detail === 0 || event.timeStamp - judgedAtMs >= CLICK_FOLLOWS_WITHIN_MS) return;
      judgedAtMs = Number.NEGATIVE_INFINITY;
      event.preventDefault();
      event.stopPropagation();
    },
    { capture: true },
  );
}

function forgetTouches(): void {
  touches.clear();
  for (const filter of filters) filter.cancel();
}

/** Why a touch did not count, for a moment after it. */
export type PressHint = Extract<PressVerdict, 'too-short' | 'too-long' | 'several-touches'> | null;

const HINT_MS = 1_800;

/** Handlers for a control that takes only deliberate presses, on wet glass too. Mouse, keys and screen readers are taken as they come. */
export function usePress(onPress: () => void) {
  const filter = useMemo(() => new PressFilter(), []);
  const [hint, setHint] = useState<PressHint>(null);
  const hintTimer = useRef<ReturnType<typeof setTimeout>>(undefined);

  useEffect(() => {
    countTouches();
    filters.add(filter);
    return () => {
      filters.delete(filter);
      clearTimeout(hintTimer.current);
    };
  }, [filter]);

  const settle = (verdict: PressVerdict) => {
    clearTimeout(hintTimer.current);
    if (verdict === 'accepted') {
      setHint(null);
      onPress();
    } else if (verdict !== 'repeated' && verdict !== 'left') {
      setHint(verdict);
      hintTimer.current = setTimeout(() => setHint(null), HINT_MS);
    }
  };

  return {
    hint,
    /** Takes a press that came another way (a pedal), under the same rule against repeats. */
    press: () => settle(filter.activate(performance.now())),
    handlers: {
      onPointerDown: (event: PointerEvent<HTMLElement>) => {
        if (event.pointerType !== 'touch') return;
        filter.down(event.pointerId, event.timeStamp, Math.max(1, touches.size));
      },
      onPointerUp: (event: PointerEvent<HTMLElement>) => {
        if (event.pointerType !== 'touch') return;
        judgedAtMs = event.timeStamp;
        const { left, right, top, bottom } = event.currentTarget.getBoundingClientRect();
        const { clientX, clientY } = event;
        const isInside = clientX >= left && clientX <= right && clientY >= top && clientY <= bottom;
        settle(filter.up(event.pointerId, event.timeStamp, isInside));
      },
      onPointerCancel: () => filter.cancel(),
      onClick: (event: MouseEvent<HTMLElement>) => {
        settle(filter.activate(event.timeStamp));
      },
    },
  };
}
