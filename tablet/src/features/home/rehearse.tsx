import { useState } from 'react';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { runSummarySchema } from '@steepfall/shared/contracts';
import { Link, useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Segmented } from '#components/segmented.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { endedRunsQuery } from '#lib/hub-queries.ts';
import { clockTime, failureWords, longDay } from '#lib/words.ts';

const rates = [1, 10, 30, 60].map((rate) => ({ value: rate, label: `${rate}×` }));

/** A kettle that does not exist: to learn the sheet with dry hands. */
export function Rehearse() {
  const [rate, setRate] = useState(30);
  const navigate = useNavigate();
  const client = useQueryClient();
  const start = useMutation({
    mutationFn: () => callHubFor(runSummarySchema, 'rehearsals', { method: 'POST', body: { rate } }),
    onSuccess: (run) => {
      void client.invalidateQueries({ queryKey: ['runs'] });
      void navigate(`/runs/${run.id}`);
    },
  });
  return (
    <section aria-labelledby="rehearse" className="grid content-start gap-6">
      <LevelRule id="rehearse">Rehearse</LevelRule>
      <p className="max-w-prose text-lead text-soft">
        A kettle that does not exist heats, steeps and falls, on a fast clock. Nothing is used up, and nothing goes into
        the book.
      </p>
      <Segmented label="Speed of the clock" value={rate} onChange={setRate} segments={rates} />
      <div>
        <Button
          look="primary"
          size="sheet"
          onClick={() => start.mutate()}
          isBusy={start.isPending}
          busyLabel="Filling the kettle"
        >
          Rehearse
        </Button>
      </div>
      {start.isError ? (
        <Banner tone="act" title="The rehearsal did not start">
          {failureWords(start.error)}
        </Banner>
      ) : null}
      <Rehearsed />
    </section>
  );
}

const SHOWN = 3;

/** The way back to the line of a rehearsal: it is in no book. */
function Rehearsed() {
  const ended = useQuery({ ...endedRunsQuery, refetchInterval: 30_000 });
  const last = (ended.data ?? [])
    .filter(({ isRehearsal }) => isRehearsal)
    .sort((a, b) => b.startedAtMs - a.startedAtMs)
    .slice(0, SHOWN);
  if (last.length === 0) return null;
  return (
    <ul aria-label="The last rehearsals">
      {last.map(({ id, startedAtMs, outcome }) => (
        <li key={id} className="border-t border-hair">
          <Link to={`/runs/${id}/record`} className="group flex min-h-12 items-center justify-between gap-6 text-body">
            <span className="underline decoration-hair decoration-2 underline-offset-4 group-hover:decoration-text">
              Rehearsal of {longDay(startedAtMs)}, {clockTime(startedAtMs)}
            </span>
            <span className="text-soft">{outcome === 'finished' ? 'finished' : 'given up'}</span>
          </Link>
        </li>
      ))}
    </ul>
  );
}
