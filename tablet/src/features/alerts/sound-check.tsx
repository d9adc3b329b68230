import { useEffect, useRef, useState } from 'react';
import { PressButton } from '#components/press-button.tsx';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { useRunStore } from '#lib/run-store/run-context.tsx';
import { askToStayAwake } from '#lib/wake-lock/wake-lock.ts';

type Stage = 'ready' | 'asking' | 'not-heard' | 'no-sound';

const words: Record<Stage, { title: string; text: string }> = {
  ready: {
    title: 'Sound check',
    text: 'The way into every run. Stand where you will work, then tap: the tablet plays the alarm that says “now”, and speaks.',
  },
  asking: {
    title: 'Did you hear it?',
    text: 'The alarm, and then the words “This is how I call you”: from the kettle, over the fan and the water.',
  },
  'not-heard': {
    title: 'Make it heard',
    text: 'Turn the volume up and the silent switch off. Is a speaker connected that stands in another room? Then play it again.',
  },
  'no-sound': {
    title: 'No sound here',
    text: 'This browser keeps the sound off. Alerts are shown large, and nothing is heard: keep the tablet in sight.',
  },
};

/** First thing in a run on this tablet: the tap that lets sound out, and the question nobody else can answer. */
export function SoundCheck() {
  const store = useRunStore();
  const [stage, setStage] = useState<Stage>('ready');
  const heading = useRef<HTMLHeadingElement>(null);
  const { title, text } = words[stage];

  useEffect(() => {
    alarmSounds.start();
    return () => alarmSounds.stopTest();
  }, []);
  useEffect(() => {
    heading.current?.focus({ preventScroll: true });
  }, [stage]);

  const play = async () => {
    askToStayAwake();
    const isOn = await alarmSounds.unlock();
    if (isOn) alarmSounds.playTest('now');
    setStage(isOn ? 'asking' : 'no-sound');
  };
  const answer = (isHeard: boolean) => {
    alarmSounds.stopTest();
    void store.act({ type: 'checkSound', isHeard });
  };

  return (
    <>
      <section className="step" aria-label="Sound check">
        <div className="step-words">
          <h1 ref={heading} tabIndex={-1} id="step-heading" className="step-title">
            {title}
          </h1>
          <p className="step-detail">{text}</p>
        </div>
      </section>
      <section className="act-bar" aria-label="Act">
        <div className="act-pair act-whole">
          {stage === 'ready' ? (
            <PressButton className="act-main" onPress={() => void play()}>
              Play the alarm
            </PressButton>
          ) : null}
          {stage === 'asking' ? (
            <>
              <PressButton
                className="act-main act-quiet"
                onPress={() => {
                  alarmSounds.stopTest();
                  setStage('not-heard');
                }}
              >
                No
              </PressButton>
              <PressButton className="act-main" onPress={() => answer(true)}>
                Yes, I heard it
              </PressButton>
            </>
          ) : null}
          {stage === 'not-heard' || stage === 'no-sound' ? (
            <>
              <PressButton className="act-main act-quiet" onPress={() => answer(false)}>
                Go on without
              </PressButton>
              <PressButton className="act-main" onPress={() => void play()}>
                {stage === 'no-sound' ? 'Try again' : 'Play it again'}
              </PressButton>
            </>
          ) : null}
        </div>
      </section>
    </>
  );
}
