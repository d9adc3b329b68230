import { useEffect, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';

export const HOLD_MS = 700;

/** A press and hold of 700 ms, by finger, mouse or key; for what ends things. */
export function useHold(onHeld: () => void) {
  const [isHolding, setIsHolding] = useState(false);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => () => clearTimeout(timer.current), []);

  const begin = () => {
    clearTimeout(timer.current);
    setIsHolding(true);
    timer.current = setTimeout(() => {
      setIsHolding(false);
      onHeld();
    }, HOLD_MS);
  };
  const end = () => {
    clearTimeout(timer.current);
    setIsHolding(false);
  };
  const isPressKey = (key: string) => key === ' ' || key === 'Enter';

  return {
    isHolding,
    handlers: {
      onPointerDown: (event: PointerEvent) => {
        if (event.button === 0) begin();
      },
      onPointerUp: end,
      onPointerLeave: end,
      onPointerCancel: end,
      onKeyDown: (event: KeyboardEvent) => {
        if (!isPressKey(event.key)) return;
        event.preventDefault();
        if (!event.repeat) begin();
      },
      onKeyUp: (event: KeyboardEvent) => {
        if (isPressKey(event.key)) end();
      },
      onBlur: end,
      onContextMenu: (event: { preventDefault: () => void }) => event.preventDefault(),
    },
  };
}
