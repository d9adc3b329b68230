import { useEffect, useState } from 'react';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { forgetPedal, keyName, learnPedal, pedalBinding } from '#lib/press/pedal-binding.ts';
import type { PedalAct } from '#lib/press/pedal-keys.ts';
import { useStored } from '#lib/value-store.ts';

const acts: { act: PedalAct; title: string; usual: string }[] = [
  { act: 'next', title: 'Next', usual: 'page down, right, down, Space or Enter' },
  { act: 'back', title: 'Back one', usual: 'page up, left or up' },
];

/** Long enough to walk to the pedal. */
const PATIENCE_MS = 20_000;

/** "Press your pedal now": each maker sends other keys, and nobody should have to know which. */
export function PedalSection() {
  const learned = useStored(pedalBinding);
  const [asked, setAsked] = useState<PedalAct | null>(null);
  const [said, setSaid] = useState('');

  useEffect(() => {
    if (!asked) return undefined;
    const onKey = (event: KeyboardEvent) => {
      event.preventDefault();
      event.stopPropagation();
      if (event.repeat) return;
      if (event.key === 'Escape' || event.key === 'Tab') {
        setAsked(null);
        setSaid('Nothing changed.');
      } else if (learnPedal(asked, event.key)) {
        setAsked(null);
        setSaid(`${keyName(event.key)} is “${asked === 'next' ? 'next' : 'back one'}” at this station.`);
      } else setSaid(`${keyName(event.key)} is a key that the keyboard needs for itself. Press another one.`);
    };
    // The press of the button itself ends with a key that comes up; only what goes down next is the pedal.
    addEventListener('keydown', onKey, { capture: true });
    const timer = setTimeout(() => {
      setAsked(null);
      setSaid(
        'No key came. Is the pedal switched on and paired with this device? Some send their keys as a sound player does, which a page cannot see: look for another mode of the pedal.',
      );
    }, PATIENCE_MS);
    return () => {
      removeEventListener('keydown', onKey, { capture: true });
      clearTimeout(timer);
    };
  }, [asked]);

  return (
    <section aria-labelledby="pedal" className="grid gap-5">
      <LevelRule id="pedal">Pedal and keys</LevelRule>
      <p className="max-w-prose text-body text-soft">
        A page-turner pedal or a clicker does the run sheet’s “done” and “back one”. Most work as they are; one that
        does not is taught here.
      </p>
      <ul className="grid gap-4">
        {acts.map(({ act, title, usual }) => {
          const key = Object.keys(learned).find((known) => learned[known] === act);
          return (
            <li key={act} className="flex flex-wrap items-center gap-x-6 gap-y-2">
              <h3 className="min-w-28 text-lead font-semibold">{title}</h3>
              <p className="min-w-60 flex-1 text-body">
                {key ? (
                  <>
                    <strong>{keyName(key)}</strong> <span className="text-soft">· learned here; and {usual}</span>
                  </>
                ) : (
                  usual
                )}
              </p>
              <Button
                onClick={() => {
                  setSaid('');
                  setAsked(asked === act ? null : act);
                }}
                aria-pressed={asked === act}
              >
                {asked === act ? 'Press your pedal now' : `Teach “${title.toLowerCase()}”`}
              </Button>
            </li>
          );
        })}
      </ul>
      <p role="status" className="min-h-7 max-w-prose text-body">
        {asked ? 'Press your pedal now. Escape leaves it as it is.' : said}
      </p>
      {Object.keys(learned).length > 0 ? (
        <div>
          <Button
            onClick={() => {
              forgetPedal();
              setSaid('Forgotten. The usual keys hold.');
            }}
          >
            Forget what was taught
          </Button>
        </div>
      ) : null}
    </section>
  );
}
