import { describeEvent } from '@steepfall/shared/runs';
import { formatTemp } from '@steepfall/shared/units';
import { Button } from '#components/button.tsx';
import { Segmented } from '#components/segmented.tsx';
import { alarmSounds, type SoundState } from '#lib/audio/alarm-sounds.ts';
import { batteryState, batteryWords } from '#lib/battery/battery.ts';
import { hubClock } from '#lib/clock/hub-clock.ts';
import { followAsked } from '#lib/follow-ask.ts';
import { openOutbox } from '#lib/run-store/open-runs.ts';
import { useLive, useRun, useRunStore } from '#lib/run-store/run-context.tsx';
import { useSession } from '#lib/session.ts';
import { chooseGround, useGroundChoice } from '#lib/theme.ts';
import { useUnits } from '#lib/units.ts';
import { useStored, useStoredPart } from '#lib/value-store.ts';
import { askToStayAwake, wakeState, type WakeState } from '#lib/wake-lock/wake-lock.ts';
import { useIsVoiceOn, voiceEar } from '#lib/voice/use-voice.ts';
import { useIsWaveOn, waveSight } from '#lib/wave/use-wave.ts';
import { handsFreeWord, voiceText, waveText } from './hands-free-words.ts';
import { Notices } from './notices.tsx';
import { SheetDialog } from './sheet-dialog.tsx';
import { Fact } from './status-fact.tsx';
import { probeText } from './probe-words.ts';

const soundText: Record<SoundState['health'], string> = {
  fine: 'Sound is on. Nobody can say from here whether it is loud enough: test it when the room gets louder.',
  untested: 'The browser keeps this page silent until somebody taps. Tap “Play the alarm”.',
  blocked: 'The browser or the device has stopped the sound, as after a call. Tap “Play the alarm”.',
  unsupported: 'This browser has no sound for pages. Alerts are shown and not heard.',
};

const wakeText: Record<WakeState, string> = {
  idle: 'No run is open, so the screen may go dark.',
  awake: 'The screen stays on while the run is open.',
  'https-needed': 'The screen can be kept on over HTTPS only. Set the tablet’s own auto-lock to “never” for today.',
  unsupported: 'This browser cannot keep the screen on. Set the tablet’s own auto-lock to “never” for today.',
  refused:
    'The tablet refused to keep the screen on. Is power saving on, or the battery low? Plug it in, then tap here.',
};

/** Why each word in the status line is what it is, and what to do about it. */
export function StatusSheet({ isOpen, onClose }: { isOpen: boolean; onClose: () => void }) {
  return (
    <SheetDialog isOpen={isOpen} onClose={onClose} title="How this tablet stands" isSide>
      <StatusFacts />
      <FollowOnPhone onAsked={onClose} />
    </SheetDialog>
  );
}

function StatusFacts() {
  const { isJoined, pendingCount, parked, isDurable, summary } = useRun();
  const health = useStoredPart(alarmSounds.state, ({ health: now }) => now);
  const wake = useStored(wakeState);
  const errorMs = useStored(hubClock.errorMs);
  const battery = batteryWords(useStored(batteryState));
  const groundChoice = useGroundChoice();
  const isWaveOn = useIsWaveOn();
  const sight = useStored(waveSight);
  const isVoiceOn = useIsVoiceOn();
  const ear = useStored(voiceEar);
  const probe = useLive(probeText);
  const { temperature } = useUnits();
  const bare = useLive(({ newest }) =>
    newest?.tempC == null ? null : formatTemp(newest.tempC, { unit: temperature }),
  );
  return (
    <dl className="status-facts">
      <Fact name="probe" word={summary?.probeId === null ? 'none' : probe}>
        {summary?.probeId === null
          ? 'This run has no probe. Type temperatures with “Measure”.'
          : `${bare ? `The probe itself says ${bare}. ` : ''}The large figure takes out how far the probe lags behind the liquid. After 30 s of silence it is not shown as if it were now.`}
      </Fact>
      <Fact name="hub" word={isJoined ? 'live' : 'away'}>
        {isJoined
          ? `Every act is on the hub within a moment.${errorMs === null ? '' : ` Clocks agree within ${Math.max(1, Math.round(errorMs))} ms.`}`
          : 'The hub does not answer. Steps, timers and alerts go on here, and everything is sent when it is back.'}
      </Fact>
      <Fact name="to send" word={String(pendingCount)}>
        {isDurable
          ? 'What waits is kept on this tablet, through a reload as well.'
          : 'This browser keeps nothing: a reload loses what was not sent. Leave private browsing, or free some space.'}
      </Fact>
      {parked.length > 0 ? (
        <Fact name="refused" word={String(parked.length)}>
          <Refused />
        </Fact>
      ) : null}
      <Fact name="sound" word={health === 'fine' ? 'on' : 'off'}>
        {soundText[health]}
        <PlayAlarm />
      </Fact>
      <Fact name="screen" word={wake === 'awake' ? 'awake' : 'may go dark'}>
        {wakeText[wake]}
        {wake === 'refused' ? (
          <Button size="sheet" className="mt-3" onClick={askToStayAwake}>
            Keep the screen on
          </Button>
        ) : null}
      </Fact>
      {isWaveOn ? (
        <Fact name="wave" word={handsFreeWord[sight]}>
          {waveText[sight]}
        </Fact>
      ) : null}
      {isVoiceOn ? (
        <Fact name="voice" word={handsFreeWord[ear]}>
          {voiceText[ear]}
        </Fact>
      ) : null}
      <Notices />
      <Fact name="battery" word={battery.word}>
        {battery.text}
      </Fact>
      <Fact name="ground" word={groundChoice}>
        <Segmented
          label="Ground"
          isLabelHidden
          value={groundChoice}
          onChange={chooseGround}
          segments={[
            { value: 'system', label: 'as the system' },
            { value: 'night', label: 'night' },
            { value: 'day', label: 'day' },
          ]}
        />
      </Fact>
    </dl>
  );
}

/** The second channel, for when the kitchen is louder than the tablet. */
function FollowOnPhone({ onAsked }: { onAsked: () => void }) {
  const { runId } = useRunStore();
  const ask = () => {
    onAsked();
    followAsked.set(runId);
  };
  return (
    <div className="grid justify-items-start gap-3 border-t-2 border-dashed border-hair pt-5">
      <p className="text-body text-soft">
        Louder here than the tablet, or somebody at the far end? A phone buzzes too.
      </p>
      <Button size="sheet" onClick={ask}>
        Follow on a phone
      </Button>
    </div>
  );
}

function PlayAlarm() {
  const play = async () => {
    if (!(await alarmSounds.unlock())) return;
    alarmSounds.playTest('stand-by');
  };
  return (
    <span className="mt-3 block">
      <Button size="sheet" onClick={() => void play()}>
        Play the alarm
      </Button>
    </span>
  );
}

/** What the hub would not take. It holds nothing up, and it is for a person to decide. */
function Refused() {
  const { parked, state } = useRun();
  const { known } = useSession();
  const { temperature } = useUnits();
  if (!known) return null;
  const outbox = openOutbox(known.house.id);
  return (
    <ul className="grid gap-4">
      {parked.map(({ eventId, runId, event, problem }) => (
        <li key={eventId} className="grid gap-2 text-text">
          <span>
            {describeEvent(event, state, temperature)}. {problem?.detail ?? problem?.title}
          </span>
          <span className="flex flex-wrap gap-3">
            <Button size="sheet" onClick={() => void outbox.then((box) => box.retry(eventId))}>
              Send again
            </Button>
            <Button size="sheet" look="danger" onClick={() => void outbox.then((box) => box.giveUp(runId, eventId))}>
              Drop it
            </Button>
          </span>
        </li>
      ))}
    </ul>
  );
}
