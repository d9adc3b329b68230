import { useState } from 'react';
import { Link } from 'react-router-dom';
import { Mark } from '#components/mark.tsx';
import { ShapeGlyph, type Shape } from '#components/shapes.tsx';
import { alarmSounds, type SoundState } from '#lib/audio/alarm-sounds.ts';
import { useLive, useRun, useRunStore } from '#lib/run-store/run-context.tsx';
import { useSession } from '#lib/session.ts';
import { useStored, useStoredPart } from '#lib/value-store.ts';
import { wakeState, type WakeState } from '#lib/wake-lock/wake-lock.ts';
import { useIsVoiceOn, voiceEar } from '#lib/voice/use-voice.ts';
import { useIsWaveOn, waveSight } from '#lib/wave/use-wave.ts';
import { clockTime } from '#lib/words.ts';
import { handsFreeWord, isHandsFreeBad } from './hands-free-words.ts';
import { isProbeBad, probeText } from './probe-words.ts';
import { StatusSheet } from './status-sheet.tsx';

interface ChipLook {
  shape: Shape;
  word: string;
  isBad: boolean;
}

const hubLook = {
  live: { shape: 'dot', word: 'live', isBad: false },
  joining: { shape: 'dash', word: 'joining', isBad: false },
  away: { shape: 'ring', word: 'away', isBad: true },
} satisfies Record<string, ChipLook>;

const soundLook: Record<SoundState['health'], ChipLook> = {
  fine: { shape: 'dot', word: 'on', isBad: false },
  untested: { shape: 'ring', word: 'tap to enable', isBad: true },
  blocked: { shape: 'ring', word: 'off', isBad: true },
  unsupported: { shape: 'ring', word: 'unsupported', isBad: true },
};

const wakeLook: Record<WakeState, ChipLook> = {
  idle: { shape: 'ring', word: 'may sleep', isBad: false },
  awake: { shape: 'dot', word: 'Awake', isBad: false },
  'https-needed': { shape: 'ring', word: 'HTTPS needed', isBad: true },
  unsupported: { shape: 'ring', word: 'Unsupported', isBad: true },
  refused: { shape: 'ring', word: 'Refused', isBad: true },
};

/** One line that says whether this tablet can be relied on. Words and shapes; a tap says why. */
export function StatusLine() {
  const { state, summary, isJoined, pendingCount, parked, isDurable } = useRun();
  const { known } = useSession();
  const [isOpen, setIsOpen] = useState(false);
  const health = useStoredPart(alarmSounds.state, ({ health: now }) => now);
  const wake = useStored(wakeState);
  const isComing = useStoredPart(useRunStore().link.state, ({ status }) => status !== 'away');
  const time = useLive(() => clockTime(Date.now()));
  const sound = soundLook[health];
  const heard =
    state.soundCheck?.isHeard === false && !sound.isBad ? { ...sound, word: 'not heard', isBad: true } : sound;
  const hasProbe = summary === null || summary.probeId !== null;
  return (
    <header className="status">
      <Link to="/" className="status-home">
        <Mark className="size-8 shrink-0" />
        <span className="status-title">
          {known ? <span className="status-house">{known.house.name} · </span> : null}
          {state.batchNumber ?? state.title}
        </span>
      </Link>
      <button type="button" className="status-chips" onClick={() => setIsOpen(true)} aria-haspopup="dialog">
        {state.status === 'ended' ? null : hasProbe ? (
          <ProbeChip />
        ) : (
          <Chip name="probe" shape="dash" word="none" isBad={false} />
        )}
        <Chip name="hub" {...(isJoined ? hubLook.live : isComing ? hubLook.joining : hubLook.away)} />
        {pendingCount > 0 ? <Chip name="to send" shape="dash" word={String(pendingCount)} isBad={false} /> : null}
        {parked.length > 0 ? <Chip name="refused" shape="diamond" word={String(parked.length)} isBad /> : null}
        {isDurable ? null : <Chip name="records" shape="ring" word="not kept" isBad />}
        <Chip name="sound" {...heard} />
        <Chip name="screen" {...wakeLook[wake]} />
        {state.status === 'running' ? <HandsFreeChips /> : null}
      </button>
      <span className="status-time">{time}</span>
      <StatusSheet isOpen={isOpen} onClose={() => setIsOpen(false)} />
    </header>
  );
}

function ProbeChip() {
  const word = useLive(probeText);
  const isBad = useLive(isProbeBad);
  return <Chip name="probe" shape={isBad ? 'ring' : 'dot'} word={word} isBad={isBad} />;
}

/** A camera or a microphone that is on is never kept quiet about. */
function HandsFreeChips() {
  const isWaveOn = useIsWaveOn();
  const sight = useStored(waveSight);
  const isVoiceOn = useIsVoiceOn();
  const ear = useStored(voiceEar);
  const look = (of: typeof sight | typeof ear) => {
    const isBad = isHandsFreeBad(of);
    return { shape: isBad ? ('ring' as const) : ('dot' as const), word: handsFreeWord[of], isBad };
  };
  return (
    <>
      {isWaveOn ? <Chip name="wave" {...look(sight)} /> : null}
      {isVoiceOn ? <Chip name="voice" {...look(ear)} /> : null}
    </>
  );
}

function Chip({ name, shape, word, isBad }: { name: string } & ChipLook) {
  return (
    <span className="chip" data-bad={isBad || undefined} data-name={name}>
      <span className="chip-name">{name}</span>
      <ShapeGlyph shape={shape} className="size-3.5 shrink-0" />
      <span className="chip-word">{word}</span>
    </span>
  );
}
