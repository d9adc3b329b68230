import { useEffect, useState, type ReactNode } from 'react';
import { Button } from '#components/button.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useStored, useStoredPart } from '#lib/value-store.ts';
import { askToStayAwake, wakeState } from '#lib/wake-lock/wake-lock.ts';
import { canVibrate } from './use-call.ts';
import { usePush, type PushState } from './use-push.ts';

const wakeHints = {
  'https-needed': 'Over plain HTTP the screen cannot be kept on. Set the auto-lock of this phone to “never” for today.',
  unsupported: 'This browser cannot keep the screen on. Set the auto-lock of this phone to “never” for today.',
  refused: 'This phone does not keep the screen on. Is it saving power?',
} as const;

const pushWords: Record<Exclude<PushState['kind'], 'off' | 'on' | 'asking' | 'failed'>, string> = {
  'https-needed': 'Notifications need HTTPS, and this page came over plain HTTP. Leave it open: it rings by itself.',
  'home-screen': 'An iPhone notifies only for apps on its home screen. Leave this page open: it rings by itself.',
  unsupported: 'This browser takes no notifications. Leave this page open: it rings by itself.',
  denied: 'Notifications are forbidden for this page. They are allowed again in the settings of the browser.',
  'hub-off': 'This hub sends no notifications. Leave this page open: it rings by itself.',
};

/** What this phone can do to reach the person who carries it. */
export function PhonePart({ token, pushKey }: { token: string; pushKey: string | null }) {
  const health = useStoredPart(alarmSounds.state, ({ health: now }) => now);
  const wake = useStored(wakeState);
  const push = usePush(token, pushKey);
  const hasSound = health === 'fine';
  const wakeHint = wake in wakeHints ? wakeHints[wake as keyof typeof wakeHints] : null;

  useEffect(() => {
    alarmSounds.keepWarm(hasSound);
    return () => alarmSounds.keepWarm(false);
  }, [hasSound]);

  return (
    <section aria-label="This phone" className="follow-phone">
      {hasSound ? null : <MakeItRing />}
      <p className="flex flex-wrap gap-x-5 gap-y-1">
        <StatusChip shape={hasSound ? 'dot' : 'ring'}>{hasSound ? 'rings' : 'silent'}</StatusChip>
        <StatusChip shape={canVibrate() ? 'dot' : 'ring'}>{canVibrate() ? 'buzzes' : 'cannot buzz'}</StatusChip>
        <StatusChip shape={wake === 'awake' ? 'dot' : 'ring'}>{wake === 'awake' ? 'awake' : 'may go dark'}</StatusChip>
      </p>
      {canVibrate() ? null : <Hint>This browser cannot buzz, as on every iPhone: keep it where you hear it.</Hint>}
      {wakeHint ? <Hint>{wakeHint}</Hint> : null}
      <Notifications {...push} />
    </section>
  );
}

function Hint({ children }: { children: ReactNode }) {
  return <p className="text-note text-soft">{children}</p>;
}

function MakeItRing() {
  const [isRefused, setIsRefused] = useState(false);
  const unlock = async () => {
    askToStayAwake();
    const isFine = await alarmSounds.unlock();
    setIsRefused(!isFine);
    if (isFine && alarmSounds.state.get().ringing === null) alarmSounds.playTest('stand-by');
    if (canVibrate()) navigator.vibrate(200);
  };
  return (
    <div className="grid gap-2">
      <Button look="primary" size="sheet" onClick={() => void unlock()}>
        Make this phone ring
      </Button>
      {isRefused ? (
        <p role="alert" className="text-note">
          The phone keeps the sound back. Is it muted, or in a call? Tap again.
        </p>
      ) : null}
    </div>
  );
}

function Notifications({ state, turnOn, turnOff }: ReturnType<typeof usePush>) {
  switch (state.kind) {
    case 'off':
    case 'asking':
      return (
        <Button onClick={() => void turnOn()} isBusy={state.kind === 'asking'} busyLabel="Asking">
          Notify me when this page is closed
        </Button>
      );
    case 'on':
      return (
        <div className="grid gap-2">
          <Hint>Notifications are on. They go through the Internet, and none is sure to arrive.</Hint>
          <Button onClick={() => void turnOff()}>No notifications</Button>
        </div>
      );
    case 'failed':
      return (
        <div className="grid gap-2">
          <p role="alert" className="text-note">
            {state.why}
          </p>
          <Button onClick={() => void turnOn()}>Try again</Button>
        </div>
      );
    default:
      return <Hint>{pushWords[state.kind]}</Hint>;
  }
}
