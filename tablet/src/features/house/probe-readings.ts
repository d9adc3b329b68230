import { useMemo, useRef } from 'react';
import { useQuery } from '@tanstack/react-query';
import { probeReadingsSchema, type Probe } from '@steepfall/shared/contracts';
import { steadiness, type Reading, type Steadiness } from '@steepfall/shared/readings';
import { callHubFor } from '#lib/api-client.ts';

/** A test at the desk looks back no further. */
const WINDOW_MS = 12 * 60_000;
const ASK_EVERY_MS = 1000;
/** A clock of a probe that is off by less than this is as good as right: readings take a moment to arrive. */
const SKEW_MS = 1000;

export interface ProbeLive {
  /** As the probe shows them, without its calibration; in order of time. */
  readings: Reading[];
  /** The newest of them, while it is fresh; `null` when the probe is silent or says that it has no signal. */
  shownC: number | null;
  isSilent: boolean;
  steady: Steadiness;
  error: Error | null;
  /** This instant on the clock that the readings are stamped with. */
  nowMs: () => number;
}

/** How long and how still a probe must stand before it is believed at a point. */
const STEADY_S = 12;
const STEADY_K = 0.15;

/** What a probe says now, asked every second: for its tests, while their dialog is open. */
export function useProbeLive(probe: Pick<Probe, 'id' | 'resolutionC' | 'samplePeriodS'>): ProbeLive {
  const clock = useRef({ hubMs: 0, atMs: 0, youngestMs: Infinity });
  const answer = useQuery({
    queryKey: ['probes', probe.id, 'live'],
    queryFn: async ({ signal }) => {
      const fromMs = Math.max(0, Math.round((clock.current.hubMs || Date.now()) - WINDOW_MS));
      const got = await callHubFor(probeReadingsSchema, `probes/${probe.id}/readings`, { signal, query: { fromMs } });
      const newest = got.readings.at(-1);
      const youngestMs = newest ? Math.min(clock.current.youngestMs, got.nowMs - newest.atMs) : Infinity;
      clock.current = { hubMs: got.nowMs, atMs: performance.now(), youngestMs };
      return got;
    },
    refetchInterval: ASK_EVERY_MS,
    gcTime: 0,
  });
  const readings = useMemo(
    () => (answer.data?.readings ?? []).map(({ atMs, shownC }): Reading => ({ atMs, tempC: shownC })),
    [answer.data],
  );
  const newest = readings.at(-1);
  const hubMs = answer.data?.nowMs ?? 0;
  const isSilent = !newest || hubMs - newest.atMs > Math.max(8, 4 * probe.samplePeriodS) * 1000;
  const steady = steadiness(readings, newest?.atMs ?? hubMs, {
    spanS: Math.max(STEADY_S, 6 * probe.samplePeriodS),
    withinK: STEADY_K + 2 * probe.resolutionC,
  });
  return {
    readings,
    shownC: isSilent ? null : newest.tempC,
    isSilent,
    steady: isSilent ? { ...steady, isSteady: false } : steady,
    error: answer.error,
    nowMs: () => {
      const { hubMs: heardMs, atMs, youngestMs } = clock.current;
      const skewMs = Math.abs(youngestMs) > SKEW_MS && Number.isFinite(youngestMs) ? youngestMs : 0;
      return heardMs + (performance.now() - atMs) - skewMs;
    },
  };
}
