import { useMutation, useQueryClient } from '@tanstack/react-query';
import { probeSchema, type Probe, type UpdateProbe } from '@steepfall/shared/contracts';
import { callHubFor } from '#lib/api-client.ts';
import { probesQuery } from '#lib/hub-queries.ts';
import { useVersion } from '#lib/save-at-version.ts';

/** Changes some of what is known of a probe, and leaves the rest as it is. */
export function useSaveProbe(probe: Probe) {
  const client = useQueryClient();
  const { version, meet } = useVersion(probe.version);
  return useMutation({
    mutationFn: (change: Partial<Omit<UpdateProbe, 'version'>>) => patchProbe({ ...probe, version }, change),
    onSuccess: () => client.invalidateQueries({ queryKey: probesQuery.queryKey }),
    onError: (error) =>
      meet(error, async () => {
        const all = await client.fetchQuery({ ...probesQuery, staleTime: 0 });
        return all.find(({ id }) => id === probe.id)?.version;
      }),
  });
}

export function patchProbe(probe: Probe, change: Partial<Omit<UpdateProbe, 'version'>>): Promise<Probe> {
  const { name, lagS, resolutionC, samplePeriodS, calibration, version } = probe;
  const body: UpdateProbe = { name, lagS, resolutionC, samplePeriodS, calibration, ...change, version };
  return callHubFor(probeSchema, `probes/${probe.id}`, { method: 'PATCH', body });
}
