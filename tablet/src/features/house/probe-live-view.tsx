import { formatTemp } from '@steepfall/shared/units';
import { LineSketch } from '#components/line-sketch.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { useUnits } from '#lib/units.ts';
import type { ProbeLive } from './probe-readings.ts';

const DRAWN_MS = 90_000;
const LEAST_SPAN_K = 2;

/** What the probe shows now, large, with the last minute and a half as a line. */
export function ProbeLiveView({ live, fromMs }: { live: ProbeLive; fromMs?: number | undefined }) {
  const { temperature: unit } = useUnits();
  const { readings, shownC, isSilent, steady } = live;
  const newestMs = readings.at(-1)?.atMs ?? 0;
  const since = Math.min(fromMs ?? Infinity, newestMs - DRAWN_MS);
  const points = readings.flatMap(({ atMs, tempC }) =>
    atMs >= since && tempC !== null ? [{ x: atMs, y: tempC }] : [],
  );
  return (
    <div className="grid items-center gap-x-8 gap-y-3 bg-sunken px-5 py-4 sm:grid-cols-[auto_1fr]">
      <div className="min-w-40">
        <p className="text-note text-soft">it shows</p>
        <p className="text-display whitespace-nowrap tabular-nums">
          {formatTemp(shownC, { unit, digits: 2, showUnit: false })}
          <span className="text-[0.6em] text-soft"> °{unit}</span>
        </p>
        <p className="mt-2 text-body" role="status">
          {isSilent || shownC === null ? (
            <StatusChip shape="diamond" tone="ember">
              no reading comes in
            </StatusChip>
          ) : steady.isSteady ? (
            <StatusChip shape="flat">steady</StatusChip>
          ) : (
            <StatusChip shape="dot" tone="soft">
              still moving
            </StatusChip>
          )}
        </p>
      </div>
      {points.length > 2 ? (
        <LineSketch points={points} leastSpan={LEAST_SPAN_K} hasEnd className="mr-3 h-20 min-w-0 sm:h-24" />
      ) : null}
      {isSilent ? (
        <p className="text-body text-soft sm:col-span-2">
          Switch the probe on and see that it reaches the hub: it needs its token and this network. Its readings appear
          here by themselves.
        </p>
      ) : null}
    </div>
  );
}
