import { useEffect, useState, useSyncExternalStore } from 'react';
import { useTabTitle } from '#components/page.tsx';
import { Wordmark } from '#components/mark.tsx';
import { Button } from '#components/button.tsx';
import { TextField } from '#components/field.tsx';
import { useStored } from '#lib/value-store.ts';
import { FollowStore } from './follow-store.ts';
import { forgetToken, readToken, tokenIn } from './follow-token.ts';
import { FollowedRunView } from './followed-run.tsx';
import './follow.css';

function subscribeHash(listener: () => void): () => void {
  addEventListener('hashchange', listener);
  return () => removeEventListener('hashchange', listener);
}

/** A run on a phone, by a link and without a sign-in: looked at, not acted in. */
export function FollowPage() {
  useTabTitle('Follow');
  const hash = useSyncExternalStore(subscribeHash, () => location.hash);
  const token = readToken(hash);
  return token ? <Followed key={token} token={token} /> : <AskForLink />;
}

function Followed({ token }: { token: string }) {
  const [store] = useState(() => new FollowStore(token));
  useEffect(() => store.start(), [store]);
  const following = useStored(store.following);
  if (following.status === 'seen') return <FollowedRunView store={store} token={token} {...following} />;
  if (following.status === 'over') return <Over {...following.problem} />;
  return (
    <Blank title={following.isAway ? 'The hub does not answer' : 'Looking for the run'}>
      <p role="status" className="text-lead text-soft">
        {following.isAway ? 'Is this phone on the network of the kitchen? It goes on asking.' : 'One moment.'}
      </p>
    </Blank>
  );
}

function Over({ title, detail }: { title: string; detail: string }) {
  useEffect(forgetToken, []);
  return (
    <Blank title={title}>
      <p role="alert" className="text-lead text-soft">
        {detail}
      </p>
    </Blank>
  );
}

function AskForLink() {
  const [text, setText] = useState('');
  const [error, setError] = useState<string>();
  return (
    <Blank title="Follow a run">
      <p className="text-lead text-soft">
        Scan the code that the run sheet shows under “Follow on a phone”, or paste its link here.
      </p>
      <form
        className="grid gap-5"
        onSubmit={(event) => {
          event.preventDefault();
          const token = tokenIn(text);
          if (token) location.hash = token;
          else setError('This is not a link of a run. Copy all of it, to the end.');
        }}
      >
        <TextField
          label="Link"
          value={text}
          error={error}
          autoComplete="off"
          inputMode="url"
          onChange={({ currentTarget }) => setText(currentTarget.value)}
        />
        <Button type="submit" look="primary" size="sheet">
          Follow
        </Button>
      </form>
    </Blank>
  );
}

function Blank({ title, children }: { title: string; children: React.ReactNode }) {
  return (
    <main className="mx-auto grid min-h-dvh w-full max-w-xl content-start gap-6 px-6 pb-10 pt-8">
      <Wordmark className="text-[1.5rem]" />
      <h1 className="mt-10 text-display">{title}</h1>
      {children}
    </main>
  );
}
