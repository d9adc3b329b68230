import { useMutation } from '@tanstack/react-query';
import { memberSchema } from '@steepfall/shared/contracts';
import type { UnitPreferences } from '@steepfall/shared/units';
import { Banner } from '#components/banner.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Segmented, type Segment } from '#components/segmented.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { noteMember } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';

const temperatures: Segment<UnitPreferences['temperature']>[] = [
  { value: 'C', label: '°C' },
  { value: 'F', label: '°F' },
];
const masses: Segment<UnitPreferences['mass']>[] = [
  { value: 'g', label: 'g' },
  { value: 'oz', label: 'oz' },
];
const volumes: Segment<UnitPreferences['volume']>[] = [
  { value: 'L', label: 'L' },
  { value: 'gal', label: 'US gal' },
];
const pressures: Segment<UnitPreferences['pressure']>[] = [
  { value: 'kPa', label: 'kPa' },
  { value: 'bar', label: 'bar' },
  { value: 'psi', label: 'psi' },
];

/** What this person reads and types, on every device they sign in on. */
export function UnitsSection() {
  const units = useUnits();
  const save = useMutation({
    mutationFn: (body: UnitPreferences) => callHubFor(memberSchema, 'me/units', { method: 'PATCH', body }),
    onSuccess: noteMember,
  });
  // What was chosen shows at once; the hub's answer, or its refusal, comes after.
  const shown = save.isPending ? save.variables : units;
  const choose = (change: Partial<UnitPreferences>) => save.mutate({ ...shown, ...change });
  return (
    <section aria-labelledby="units" className="grid gap-6">
      <LevelRule id="units">Your units</LevelRule>
      <div className="flex flex-wrap gap-x-10 gap-y-5">
        <Segmented
          label="Temperature"
          value={shown.temperature}
          onChange={(temperature) => choose({ temperature })}
          segments={temperatures}
        />
        <Segmented label="Mass" value={shown.mass} onChange={(mass) => choose({ mass })} segments={masses} />
        <Segmented label="Volume" value={shown.volume} onChange={(volume) => choose({ volume })} segments={volumes} />
        <Segmented
          label="Pressure"
          value={shown.pressure}
          onChange={(pressure) => choose({ pressure })}
          segments={pressures}
        />
      </div>
      <p className="max-w-prose text-body text-soft">
        You read and type these wherever you sign in; others keep theirs. What you typed is never rounded by the change.
      </p>
      {save.isError ? (
        <Banner tone="act" title="Your units were not changed">
          {failureWords(save.error)}
        </Banner>
      ) : null}
    </section>
  );
}
