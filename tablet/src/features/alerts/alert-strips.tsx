import { alertWords, standingAlerts, type Alert } from '@steepfall/shared/runs';
import { PressButton } from '#components/press-button.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useLive, useRunState, useRunStore } from '#lib/run-store/run-context.tsx';
import { useUnits } from '#lib/units.ts';
import { alertLevel, dueAtMs, dueText } from './alert-level.ts';
import { SoundStrip } from './sound-strip.tsx';
import { useSoundOff } from './use-sound-off.ts';

const stageWords = { 'coming-up': 'Coming up', 'stand-by': 'Stand by', now: 'Now', missed: 'Late' } as const;

/** What is on its way, or a sound that is off: one calm line, at the place kept for it. */
export function AlertStrips() {
  const state = useRunState();
  const isTaken = standingAlerts(state).some(({ stage }) => stage === 'now' || stage === 'missed');
  const next = standingAlerts(state)[0];
  if (next && !isTaken) return <Strip alert={next} />;
  return isTaken ? null : <SoundStrip />;
}

function Strip({ alert }: { alert: Alert }) {
  const units = useUnits();
  const state = useRunState();
  const store = useRunStore();
  const due = useLive((live) => dueText(dueAtMs(alert, live), live.nowMs));
  const { verb } = alertWords(state, alert);
  const number = alertLevel(alert, units);
  const { key, crossing, stage } = alert;
  const isSoundOff = useSoundOff();
  const acknowledge = () => {
    if (isSoundOff) void alarmSounds.unlock();
    void store.act({ type: 'acknowledgeAlert', key, crossing });
  };
  return (
    <div className="strip" data-stage={stage}>
      <ShapeGlyph shape="diamond" className="size-7 shrink-0" />
      <p className="strip-text">
        <strong>{stageWords[stage]}:</strong> {verb}
        {number ? ` at ${number}` : ''}
        {due ? <span className="tabular-nums">, {due}</span> : null}
        {isSoundOff ? <strong> · Sound is off</strong> : null}
      </p>
      <span className="sr-only" role="status">
        {stageWords[stage]}: {verb}
      </span>
      <PressButton className="strip-act" onPress={acknowledge}>
        Heard it
      </PressButton>
    </div>
  );
}
