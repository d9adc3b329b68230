import { useEffect, useMemo, useRef, useState, type MouseEvent, type PointerEvent } from 'react';
import { PressFilter, type PressVerdict } from './press-filter.ts';

const touches = new Set<number>();
const filters = new Set<PressFilter>();
let isCounting = false;

/** Fingers on the glass are counted for the whole page: a palm beside the button spoils the press on it. */
function countTouches(): void {
  if (isCounting) return;
  isCounting = true;
  const capture = { capture: true, passive: true };
  addEventListener(
    'pointerdown',
    ({ pointerType, pointerId }) => {
      if (pointerType !== 'touch') return;
      touches.add(pointerId);
      if (touches.size > 1) for (const filter of filters) filter.spoil();
    },
    capture,
  );
  const lift = ({ pointerId }: globalThis.PointerEvent) => touches.delete(pointerId);
  addEventListener('pointerup', lift, capture);
  addEventListener('pointercancel', lift, capture);
}

/** Why a touch did not count, for a moment after it. */
export type PressHint = Extract<PressVerdict, 'too-short' | 'too-long' | 'several-touches'> | null;

const HINT_MS = 1_800;

/** Handlers for a control that takes only deliberate presses, on wet glass too. Mouse, keys and screen readers are taken as they come. */
export function usePress(onPress: () => void) {
  const filter = useMemo(() => new PressFilter(), []);
  const [hint, setHint] = useState<PressHint>(null);
  const hintTimer = useRef<ReturnType<typeof setTimeout>>(undefined);
  const touchedAtMs = useRef(Number.NEGATIVE_INFINITY);

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
        touchedAtMs.current = event.timeStamp;
        const { left, right, top, bottom } = event.currentTarget.getBoundingClientRect();
        const { clientX, clientY } = event;
        const isInside = clientX >= left && clientX <= right && clientY >= top && clientY <= bottom;
        settle(filter.up(event.pointerId, event.timeStamp, isInside));
      },
      onPointerCancel: () => filter.cancel(),
      onClick: (event: MouseEvent<HTMLElement>) => {
        // The click that follows a touch was judged already.
        if (event.timeStamp - touchedAtMs.current < 800) return;
        settle(filter.activate(event.timeStamp));
      },
    },
  };
}
