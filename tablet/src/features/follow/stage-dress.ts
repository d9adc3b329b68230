import type { AlertStage } from '@steepfall/shared/runs';
import type { AlarmLevel } from '#lib/audio/alarm-sounds.ts';
import type { Shape } from '#components/shapes.tsx';

/** A stage on a phone: its word, its shape, how it buzzes and rings. */
export const stageDress: Record<AlertStage, { word: string; shape: Shape; level: AlarmLevel; buzzMs: number[] }> = {
  'coming-up': { word: 'Coming up', shape: 'ring', level: 'coming-up', buzzMs: [120] },
  'stand-by': { word: 'Stand by', shape: 'dot', level: 'stand-by', buzzMs: [160, 120, 160] },
  now: { word: 'Now', shape: 'diamond', level: 'now', buzzMs: [300, 120, 300, 120, 600] },
  missed: { word: 'Late', shape: 'diamond', level: 'now', buzzMs: [300, 120, 300, 120, 600] },
};
