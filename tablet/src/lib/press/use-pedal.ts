import { useEffect, useRef } from 'react';
import { pedalBinding } from './pedal-binding.ts';
import { pedalActOf, type PedalAct } from './pedal-keys.ts';

const DEBOUNCE_MS = 300;
const CONTROLS = 'a[href], button, [role="button"], [role="radio"], [role="checkbox"], summary';
const FIELDS = 'input, textarea, select, [contenteditable="true"]';

/** Pedals and keys of the run sheet, taken once, before anything else on the page sees them. */
export function usePedal(onAct: (act: PedalAct) => void, isAlertStanding: () => boolean): void {
  const handler = useRef(onAct);
  const isAlerted = useRef(isAlertStanding);
  useEffect(() => {
    handler.current = onAct;
    isAlerted.current = isAlertStanding;
  });
  useEffect(() => {
    let hasTabbed = false;
    let lastMs = Number.NEGATIVE_INFINITY;
    const actOf = (event: KeyboardEvent) => {
      const focused = document.activeElement;
      const input = {
        key: event.key,
        hasModifier: event.ctrlKey || event.altKey || event.metaKey || event.shiftKey,
        isTyping: focused?.matches(FIELDS) ?? false,
        isDialogOpen: document.querySelector('[role="dialog"], [role="alertdialog"]') !== null,
        isAlertStanding: isAlerted.current(),
        isOnTabbedControl: hasTabbed && (focused?.matches(CONTROLS) ?? false),
        isOnTabbedChoice: hasTabbed && (focused?.matches('[role="radio"]') ?? false),
      };
      return pedalActOf(input, pedalBinding.get());
    };
    const onKeyDown = (event: KeyboardEvent) => {
      if (event.key === 'Tab') hasTabbed = true;
      const act = actOf(event);
      if (!act) return;
      event.preventDefault();
      event.stopPropagation();
      if (event.repeat || event.timeStamp - lastMs < DEBOUNCE_MS) return;
      lastMs = event.timeStamp;
      handler.current(act);
    };
    // A focused button is pressed when the key comes up: that belongs to the pedal as well.
    const onKeyUp = (event: KeyboardEvent) => {
      if (event.key === ' ' && actOf(event)) event.preventDefault();
    };
    const onPointerDown = () => {
      hasTabbed = false;
    };
    addEventListener('keydown', onKeyDown, { capture: true });
    addEventListener('keyup', onKeyUp, { capture: true });
    addEventListener('pointerdown', onPointerDown, { capture: true, passive: true });
    return () => {
      removeEventListener('keydown', onKeyDown, { capture: true });
      removeEventListener('keyup', onKeyUp, { capture: true });
      removeEventListener('pointerdown', onPointerDown, { capture: true });
    };
  }, []);
}
