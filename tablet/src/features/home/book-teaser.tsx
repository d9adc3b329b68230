import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Batch } from '@steepfall/shared/contracts';
import { Link } from 'react-router-dom';
import { LevelRule } from '#components/level-rule.tsx';
import { runReadingsQuery } from '#lib/hub-queries.ts';
import { linePoints } from '#lib/liquid-line.ts';
import { calendarDay } from '#lib/words.ts';
import { LiquidSketch } from './liquid-sketch.tsx';

/** The newest finished batch: its line, and the way into the book. */
export function BookTeaser({ batch }: { batch: Batch | undefined }) {
  const runId = batch?.run?.id ?? '';
  const readings = useQuery({
    ...runReadingsQuery(runId, { buckets: 240 }),
    enabled: runId !== '',
    staleTime: Infinity,
  });
  const line = useMemo(() => linePoints(readings.data?.readings ?? []), [readings.data]);
  return (
    <section aria-labelledby="from-the-book" className="grid content-start gap-6">
      <LevelRule
        id="from-the-book"
        aside={
          <Link to="/batches" className="inline-flex min-h-12 items-center underline underline-offset-4">
            The whole book
          </Link>
        }
      >
        From the book
      </LevelRule>
      {batch ? (
        <Link to={`/batches/${batch.id}`} className="group grid gap-4">
          <span>
            <span className="block text-title group-hover:underline group-hover:decoration-2 group-hover:underline-offset-4">
              {batch.recipeName}
            </span>
            <span className="mt-1 block text-body text-soft">
              batch {batch.batchNumber} · {calendarDay(batch.plannedOn)}
            </span>
          </span>
          <LiquidSketch line={line} className="h-40" />
        </Link>
      ) : (
        <p className="text-lead text-soft">The first finished batch hangs here, with its line.</p>
      )}
    </section>
  );
}
