import type { RunSummary } from '@steepfall/shared/contracts';
import type { DriverConfig } from '@steepfall/shared/runs';

export function driverConfigOf(summary: RunSummary): DriverConfig {
  const { probeId, probeLagS, probeResolutionC, probeSamplePeriodS, roomC, coolantC } = summary;
  return {
    hasProbe: probeId !== null,
    watch: {
      lagS: probeLagS,
      resolutionC: probeResolutionC,
      samplePeriodS: probeSamplePeriodS,
      lagErrorRatio: summary.probeLagErrorRatio,
      chillerPerS: summary.chillerPerS,
      roomC,
      coolantC,
    },
  };
}
