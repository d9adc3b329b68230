import { useMemo } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { RunSummary } from '@steepfall/shared/contracts';
import { foldRun } from '@steepfall/shared/runs';
import { formatRate, formatTemp } from '@steepfall/shared/units';
import { Button, ButtonLink } from '#components/button.tsx';
import { directionDress } from '#components/direction-dress.ts';
import { StatusChip } from '#components/status-chip.tsx';
import { followAsked } from '#lib/follow-ask.ts';
import { runLogQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { clockTime } from '#lib/words.ts';
import { LiquidSketch } from './liquid-sketch.tsx';
import { useLiquid, type Liquid } from './use-liquid.ts';

const stageWords = { 'coming-up': 'coming up', 'stand-by': 'stand by', now: 'act now', missed: 'late' } as const;

function levelsOf(log: Parameters<typeof foldRun>[0]): number[] {
  return foldRun(log).steps.flatMap(({ step: { start, done } }) =>
    [start, done].flatMap((condition) => (condition.by === 'temperature' ? [condition.tempC] : [])),
  );
}

/** One run that is on: what to do now, in letters that are read from the door. */
export function RunningRun({ run }: { run: RunSummary }) {
  const liquid = useLiquid(run);
  const may = useMay();
  const log = useQuery({ ...runLogQuery(run.id), staleTime: 60_000 });
  const levels = useMemo(() => levelsOf(log.data ?? []), [log.data]);
  return (
    <article aria-label={run.title} className="grid gap-6">
      <div className="grid gap-x-10 gap-y-5 md:grid-cols-[1fr_auto]">
        <div className="grid content-start gap-4">
          <p className="flex flex-wrap items-center gap-x-5 gap-y-1 text-body text-soft">
            <span>{run.title}</span>
            {run.isRehearsal ? (
              <StatusChip shape="dash" tone="text">
                rehearsal at {run.clock.rate}×
              </StatusChip>
            ) : (
              <span>batch {run.batchNumber}</span>
            )}
            <span>since {clockTime(run.startedAtMs)}</span>
          </p>
          <h3 className="text-display">{run.currentStepTitle ?? 'Every step is done'}</h3>
          {run.alertStage ? (
            <p className="text-lead">
              <StatusChip
                shape={run.alertStage === 'coming-up' ? 'ring' : 'diamond'}
                tone={run.alertStage === 'now' || run.alertStage === 'missed' ? 'ember' : 'text'}
              >
                {stageWords[run.alertStage]}
              </StatusChip>
            </p>
          ) : null}
        </div>
        <Temperature liquid={liquid} />
      </div>
      <div className="flex flex-col-reverse gap-6 md:flex-row md:items-center md:gap-10">
        <div className="grid shrink-0 gap-3">
          <ButtonLink look="primary" size="sheet" to={`/runs/${run.id}`}>
            Open the run sheet
          </ButtonLink>
          {may('runs:act') ? (
            <Button look="quiet" onClick={() => followAsked.set(run.id)}>
              Follow on a phone
            </Button>
          ) : null}
        </div>
        {liquid.line.length > 2 ? (
          <LiquidSketch line={liquid.line} levels={levels} hasEnd className="mr-3 h-32 min-w-0 md:h-36 md:flex-1" />
        ) : null}
      </div>
    </article>
  );
}

function Temperature({ liquid: { estimate } }: { liquid: Liquid }) {
  const { temperature: unit } = useUnits();
  if (!estimate || estimate.tempC === null) {
    return (
      <p className="self-start text-lead text-soft">
        <StatusChip shape="ring" tone="soft">
          no reading yet
        </StatusChip>
      </p>
    );
  }
  const { word, shape, tone } = directionDress[estimate.mode];
  const isLive = estimate.status === 'live' || estimate.status === 'starting';
  return (
    <div className="md:text-right">
      <p className="text-figure whitespace-nowrap">
        {formatTemp(estimate.tempC, { unit, showUnit: false })}
        <span className="text-[0.45em] text-soft"> °{unit}</span>
      </p>
      <p className="mt-3 text-lead">
        {isLive ? (
          <StatusChip shape={shape} tone={tone}>
            {word}
            {estimate.mode === 'holding' || estimate.rateCPerMin === null
              ? ''
              : ` ${formatRate(estimate.rateCPerMin, { unit })}`}
          </StatusChip>
        ) : (
          <StatusChip shape="diamond" tone="ember">
            the probe is silent
          </StatusChip>
        )}
      </p>
    </div>
  );
}
