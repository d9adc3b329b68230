import { useState } from 'react';
import { Button } from '#components/button.tsx';
import { allowNotices, noticeState, type NoticeState } from '#lib/audio/knock.ts';
import { Fact } from './status-fact.tsx';

const words: Record<NoticeState, { word: string; text: string }> = {
  allowed: {
    word: 'allowed',
    text: 'When nobody answers a “now” and this page is out of sight, the device itself shows a notice.',
  },
  'not-asked': {
    word: 'not asked',
    text: 'When nobody answers a “now” and this page is out of sight, the device itself can show a notice.',
  },
  refused: {
    word: 'refused',
    text: 'The browser shows no notices of this page. Keep the page in sight, or allow them in its settings.',
  },
  unsupported: {
    word: 'none',
    text: 'This browser shows notices over HTTPS only, or not at all. Keep the page in sight.',
  },
};

/** The second channel of this tablet. */
export function Notices() {
  const [state, setState] = useState(noticeState);
  const { word, text } = words[state];
  return (
    <Fact name="notices" word={word}>
      {text}
      {state === 'not-asked' ? (
        <span className="mt-3 block">
          <Button size="sheet" onClick={() => void allowNotices().then(setState)}>
            Allow notices
          </Button>
        </span>
      ) : null}
    </Fact>
  );
}
