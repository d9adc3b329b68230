import type { Batch } from '@steepfall/shared/contracts';
import { StatusChip } from '#components/status-chip.tsx';
import type { Shape, Tone } from '#components/shapes.tsx';

const dress: Record<Batch['status'], { word: string; shape: Shape; tone: Tone }> = {
  planned: { word: 'planned', shape: 'ring', tone: 'soft' },
  running: { word: 'running', shape: 'dot', tone: 'text' },
  finished: { word: 'finished', shape: 'flat', tone: 'text' },
  cancelled: { word: 'cancelled', shape: 'dash', tone: 'soft' },
  abandoned: { word: 'given up', shape: 'dash', tone: 'soft' },
};

export function BatchStatus({ status }: { status: Batch['status'] }) {
  const { word, shape, tone } = dress[status];
  return (
    <StatusChip shape={shape} tone={tone}>
      {word}
    </StatusChip>
  );
}
