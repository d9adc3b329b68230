import { useEffect, useState } from 'react';
import type { FollowedAlert } from '@steepfall/shared/contracts';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { stageDress } from './stage-dress.ts';

const stageId = ({ tag, stage }: FollowedAlert) => `${tag}/${stage}`;

export function canVibrate(): boolean {
  return 'vibrate' in navigator;
}

/** Buzzes at each new stage, and rings until somebody at the kettle has heard it, or this phone is told to be quiet. */
export function useCall(alert: FollowedAlert | null): { isQuiet: boolean; beQuiet: () => void } {
  const [quietId, setQuietId] = useState<string | null>(null);
  const id = alert ? stageId(alert) : null;
  const stage = alert?.stage ?? null;
  const isQuiet = id !== null && id === quietId;

  useEffect(() => {
    alarmSounds.start();
    return () => alarmSounds.ring(null);
  }, []);

  useEffect(() => {
    if (id === null || stage === null || isQuiet) {
      alarmSounds.ring(null);
      if (canVibrate()) navigator.vibrate(0);
      return;
    }
    const { level, buzzMs } = stageDress[stage];
    alarmSounds.ring({ level, id });
    if (canVibrate()) navigator.vibrate(buzzMs);
  }, [id, stage, isQuiet]);

  return { isQuiet, beQuiet: () => setQuietId(id) };
}
