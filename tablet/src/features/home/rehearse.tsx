import { useState } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { runSummarySchema } from '@steepfall/shared/contracts';
import { useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Segmented } from '#components/segmented.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { failureWords } from '#lib/words.ts';

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
    </section>
  );
}
