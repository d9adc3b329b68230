import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useRunState } from '#lib/run-store/run-context.tsx';
import { useStoredPart } from '#lib/value-store.ts';
import { useSoundOff } from './use-sound-off.ts';

const TEST_MS = 6_000;

async function listenAgain(): Promise<void> {
  if (!(await alarmSounds.unlock())) return;
  alarmSounds.playTest('stand-by');
  setTimeout(() => alarmSounds.stopTest(), TEST_MS);
}

/** A browser keeps a page silent until somebody taps, and again after calls and locks. Nobody would know. */
export function SoundStrip() {
  const isOff = useSoundOff();
  const { status } = useRunState();
  const wasInterrupted = useStoredPart(alarmSounds.state, (sound) => sound.wasInterrupted);
  if (isOff) {
    return (
      <PressButton className="strip strip-button" onPress={() => void alarmSounds.unlock()}>
        <ShapeGlyph shape="ring" className="size-7 shrink-0" />
        <span className="strip-text">
          <strong>Sound is off:</strong> tap to enable
        </span>
      </PressButton>
    );
  }
  if (!wasInterrupted || status !== 'running') return null;
  return (
    <PressButton className="strip strip-button" onPress={() => void listenAgain()}>
      <ShapeGlyph shape="ring" className="size-7 shrink-0" />
      <span className="strip-text">
        <strong>Sound was away</strong> and is back: tap, and listen whether you still hear it
      </span>
    </PressButton>
  );
}
