import type { ReactNode } from 'react';
import { LevelRule } from '#components/level-rule.tsx';
import { Segmented } from '#components/segmented.tsx';
import { canPassSilentSwitch, choosePastSilentSwitch, isPastSilentSwitch } from '#lib/audio/silent-switch.ts';
import { useStored } from '#lib/value-store.ts';
import { chooseVoice, useIsVoiceOn } from '#lib/voice/use-voice.ts';
import { chooseWave, useIsWaveOn } from '#lib/wave/use-wave.ts';

const offAndOn = [
  { value: 'off', label: 'Off' },
  { value: 'on', label: 'On' },
] as const;

function Switch({
  label,
  isOn,
  onChoose,
  children,
}: {
  label: string;
  isOn: boolean;
  onChoose: (isOn: boolean) => void;
  children: ReactNode;
}) {
  return (
    <div className="grid gap-3">
      <Segmented
        label={label}
        value={isOn ? 'on' : 'off'}
        onChange={(next) => onChoose(next === 'on')}
        segments={[...offAndOn]}
      />
      <p className="max-w-prose text-body text-soft">{children}</p>
    </div>
  );
}

/** Ways to act on the sheet, and to be reached by it, without a hand on the glass. */
export function HandsSection() {
  const isWaveOn = useIsWaveOn();
  const isVoiceOn = useIsVoiceOn();
  const isPastSwitch = useStored(isPastSilentSwitch);
  return (
    <section aria-labelledby="hands" className="grid gap-8">
      <LevelRule id="hands">With hands full</LevelRule>
      <Switch label="Wave for done" isOn={isWaveOn} onChoose={chooseWave}>
        Wave in front of the tablet, across and back: it does what a pedal does. The camera is on only while a run goes
        on and its sheet is in sight; its pictures are looked at on this device, and none is kept or sent. Steam and a
        greasy lens get in its way; a pedal never minds them.
      </Switch>
      <Switch label="Listen for words" isOn={isVoiceOn} onChoose={chooseVoice}>
        “Done”, “back one”, “heard it”, “how hot”, “how long”, “note: …”. Only where this browser understands English
        speech on the device itself. Where it would send it away, it is not used, and the run sheet says so.
      </Switch>
      {canPassSilentSwitch() ? (
        <Switch label="Alarms past the silent switch" isOn={isPastSwitch} onChoose={choosePastSilentSwitch}>
          On, alarms sound although the tablet is switched to silent. It may pause music that plays on the same tablet.
        </Switch>
      ) : null}
    </section>
  );
}
