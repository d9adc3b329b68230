import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { RunSummary } from '@steepfall/shared/contracts';
import type { Reading } from '@steepfall/shared/readings';
import { runTimeAt } from '@steepfall/shared/timers';
import { estimateAt, startWatch, watchReading, type WatchEstimate } from '@steepfall/shared/watch';
import { recentReadingsQuery, runReadingsQuery } from '#lib/hub-queries.ts';
import { linePoints, type LinePoint } from '#lib/liquid-line.ts';

const LOOK_MS = 3_000;
const REDRAW_MS = 12_000;
/** Enough readings for the watch to know slope and mode. */
const RECENT_MS = 4 * 60_000;

export interface Liquid {
  /** `null` until the first readings came. */
  estimate: WatchEstimate | null;
  line: LinePoint[];
}

function estimateOf(run: RunSummary, readings: readonly Reading[]): WatchEstimate | null {
  const last = readings.at(-1);
  if (!last) return null;
  const { probeLagS: lagS, roomC, coolantC, probeSamplePeriodS: samplePeriodS, probeResolutionC: resolutionC } = run;
  const started = startWatch({ lagS, roomC, coolantC, samplePeriodS, resolutionC });
  const watch = readings.reduce((state, reading) => watchReading(state, reading), started);
  return estimateAt(watch, last.atMs);
}

/** What the liquid of a running run is doing, at a glance. The run sheet has the live one. */
export function useLiquid(run: RunSummary): Liquid {
  const recent = useQuery({
    ...recentReadingsQuery(run.id, (nowMs) => Math.max(0, runTimeAt(run.clock, nowMs) - RECENT_MS)),
    refetchInterval: LOOK_MS,
  });
  const whole = useQuery({ ...runReadingsQuery(run.id, { buckets: 240 }), refetchInterval: REDRAW_MS });
  const estimate = useMemo(() => estimateOf(run, recent.data?.readings ?? []), [run, recent.data]);
  const line = useMemo(() => linePoints(whole.data?.readings ?? []), [whole.data]);
  return { estimate, line };
}
