import { useEffect, useState } from 'react';
import { isToday } from 'date-fns';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { followLinksSchema, newFollowLinkSchema, type FollowLink } from '@steepfall/shared/contracts';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { Segmented } from '#components/segmented.tsx';
import { callHub, callHubFor } from '#lib/api-client.ts';
import { alarmSounds } from '#lib/audio/alarm-sounds.ts';
import { followAsked } from '#lib/follow-ask.ts';
import { useStored, useStoredPart } from '#lib/value-store.ts';
import { clockTime, failureWords } from '#lib/words.ts';
import { linkOrigins } from './link-origin.ts';
import { QrCode } from './qr-code.tsx';

/** "16:54 tomorrow": no link lasts longer than a day. */
function untilWords(atMs: number): string {
  return isToday(atMs) ? clockTime(atMs) : `${clockTime(atMs)} tomorrow`;
}

const close = () => followAsked.set(null);

/** Opened by whoever asks through `followAsked`. An alarm closes it: what it covers is more urgent. */
export function FollowDialog() {
  const runId = useStored(followAsked);
  const isRinging = useStoredPart(alarmSounds.state, ({ ringing }) => ringing !== null);
  useEffect(() => {
    if (isRinging) close();
  }, [isRinging]);
  useEffect(() => close, []);
  return (
    <Dialog isOpen={runId !== null} onClose={close} title="Follow on a phone" size="wide">
      {runId ? <Links key={runId} runId={runId} /> : null}
    </Dialog>
  );
}

function Links({ runId }: { runId: string }) {
  const client = useQueryClient();
  const path = `runs/${runId}/follow-links`;
  const key = ['runs', runId, 'follow-links'];
  const known = useQuery({
    queryKey: key,
    queryFn: ({ signal }) => callHubFor(followLinksSchema, path, { signal }),
    refetchInterval: 5_000,
  });
  const again = () => client.invalidateQueries({ queryKey: key });
  const make = useMutation({
    mutationFn: () => callHubFor(newFollowLinkSchema, path, { method: 'POST' }),
    onSuccess: again,
  });
  const takeBack = useMutation({
    mutationFn: (linkId: string) => callHub(`${path}/${linkId}`, { method: 'DELETE' }),
    onSuccess: (_, linkId) => {
      if (make.data?.link.id === linkId) make.reset();
      return again();
    },
  });
  const failure = make.error ?? takeBack.error ?? (known.data ? null : known.error);
  const made = make.data;
  return (
    <div className="grid gap-6">
      {made && known.data ? (
        <Made followToken={made.followToken} lanOrigins={known.data.origins} />
      ) : (
        <p className="max-w-prose text-lead">
          The phone shows this run and nothing else: what to do, the temperature, the alerts. It rings and buzzes, and
          changes nothing. Whoever has the link can look, without a sign-in.
        </p>
      )}
      {failure ? (
        <p role="alert" className="font-medium text-ember">
          {failureWords(failure)}
        </p>
      ) : null}
      <div className="flex flex-wrap gap-3">
        {made ? null : (
          <Button
            look="primary"
            size="sheet"
            onClick={() => make.mutate()}
            isBusy={make.isPending}
            busyLabel="Making it"
          >
            Make a link
          </Button>
        )}
        <Button size="sheet" onClick={close}>
          Close
        </Button>
      </div>
      <OpenLinks links={known.data?.links ?? []} newId={made?.link.id} onTakeBack={(id) => takeBack.mutate(id)} />
    </div>
  );
}

const reachWords = {
  here: 'The phone must be on a network that reaches this address.',
  lan: 'This page is open on the hub’s own machine as “localhost”, which means something else on a phone. The link uses an address of the machine on the network; the phone must be on the same one. Over plain HTTP it rings and buzzes, and gets no notifications.',
  'own-machine':
    'This page is open as “localhost”, and the hub answers its own machine only: no phone reaches this link. Open Steepfall at an address that other devices reach, over HTTPS, and make a link there.',
} as const;

function Made({ followToken, lanOrigins }: { followToken: string; lanOrigins: readonly string[] }) {
  const { origins, reach } = linkOrigins(location, lanOrigins);
  const [chosen, setChosen] = useState(origins[0]);
  const [copied, setCopied] = useState<'yes' | 'no' | null>(null);
  const link = `${chosen}/follow#${followToken}`;
  const copy = () =>
    // Plain HTTP has no clipboard.
    (navigator as Partial<Navigator>).clipboard?.writeText(link).then(
      () => setCopied('yes'),
      () => setCopied('no'),
    ) ?? setCopied('no');
  return (
    <div className="grid items-start gap-6 sm:grid-cols-[20rem_1fr]">
      <QrCode text={link} label="Code of the link, for the camera of a phone" />
      <div className="grid min-w-0 gap-4">
        <p className="text-lead">Scan the code with the camera of the phone, or open this:</p>
        <p className="border-l-4 border-text pl-4 text-body font-medium break-all select-all">{link}</p>
        <div className="flex flex-wrap items-center gap-4">
          <Button onClick={() => void copy()}>Copy the link</Button>
          <p role="status" className="text-note text-soft">
            {copied === 'yes' ? 'Copied.' : copied === 'no' ? 'Mark the text and copy it by hand.' : ''}
          </p>
        </div>
        {origins.length > 1 ? (
          <Segmented
            label="Address of the hub"
            value={chosen ?? ''}
            onChange={setChosen}
            segments={origins.map((value) => ({ value, label: value.replace('http://', '') }))}
          />
        ) : null}
        <p className={reach === 'own-machine' ? 'text-body font-medium' : 'text-body text-soft'}>{reachWords[reach]}</p>
        <p className="text-body text-soft">
          It is shown this once. For another phone scan it now, or make another one.
        </p>
      </div>
    </div>
  );
}

function OpenLinks({
  links,
  newId,
  onTakeBack,
}: {
  links: readonly FollowLink[];
  newId: string | undefined;
  onTakeBack: (linkId: string) => void;
}) {
  if (links.length === 0) return null;
  return (
    <section aria-labelledby="open-links" className="grid gap-2">
      <h3 id="open-links" className="text-lead font-medium">
        Links that open this run
      </h3>
      <ul>
        {links.map(({ id, createdAtMs, createdBy, expiresAtMs, phoneCount }) => (
          <li key={id} className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-hair py-3">
            <p className="min-w-56 flex-1 text-body">
              {id === newId ? 'This one' : `Made ${clockTime(createdAtMs)} by ${createdBy}`}
              <span className="block text-note text-soft">
                {`open until ${untilWords(expiresAtMs)}, or an hour after the end`}
                {phoneCount > 0 ? ` · notifies ${phoneCount === 1 ? 'one phone' : `${phoneCount} phones`}` : ''}
              </span>
            </p>
            <Button look="danger" onClick={() => onTakeBack(id)}>
              Take it back
            </Button>
          </li>
        ))}
      </ul>
    </section>
  );
}
