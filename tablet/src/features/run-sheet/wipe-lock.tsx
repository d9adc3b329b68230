import { useEffect, useState } from 'react';
import { useHold } from '#lib/press/use-hold.ts';

const LOCK_S = 15;

/** Held, not tapped: a cloth that begins before the lock does no harm, and a drop does not start it. */
export function WipeButton({ onHeld }: { onHeld: () => void }) {
  const { isHolding, handlers } = useHold(onHeld);
  return (
    <button
      type="button"
      {...handlers}
      className="foot-button wipe-button"
      data-holding={isHolding || undefined}
      aria-label={`Wipe: hold to lock the glass for ${LOCK_S} seconds`}
    >
      <span className="foot-all">
        <span className="wipe-fill" aria-hidden="true" />
        Wipe: hold
      </span>
    </button>
  );
}

/** Takes every touch for a while. Alerts are heard and seen as ever; pedal, keys, wave and voice answer them. */
export function WipeLock({ onOver }: { onOver: () => void }) {
  const [leftS, setLeftS] = useState(LOCK_S);
  useEffect(() => {
    const endsAtMs = performance.now() + LOCK_S * 1000;
    const timer = setInterval(() => {
      const left = Math.ceil((endsAtMs - performance.now()) / 1000);
      if (left <= 0) onOver();
      else setLeftS(left);
    }, 200);
    return () => clearInterval(timer);
  }, [onOver]);
  return (
    <div className="wipe-lock">
      <div className="wipe-band">
        <p className="text-title font-semibold" role="status">
          Wipe the screen now
        </p>
        <p className="wipe-left" role="timer" aria-label="seconds until the glass takes touches again">
          {leftS}
        </p>
        <p className="text-lead">Touches do nothing. Alerts come through, and the pedal works.</p>
      </div>
    </div>
  );
}
