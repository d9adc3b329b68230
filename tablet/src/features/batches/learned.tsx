import type { ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Equipment, Probe, RunLearned, RunSummary } from '@steepfall/shared/contracts';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { equipmentQuery, probesQuery, runLearnedQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';
import { keptValue, useSaveLesson, useSaveReach, type BatchKit } from './learned-save.ts';
import { lessonWords, reachWords, type KitLesson, type LessonWords } from './learned-words.ts';

interface LearnedProps {
  run: RunSummary;
  /** Where what was learned belongs; null for a rehearsal. */
  kit: BatchKit | null;
}

/** What a run that is over taught, told against learned. Nothing is saved until somebody says so. */
export function Learned({ run, kit }: LearnedProps) {
  const isOver = run.status === 'ended';
  const may = useMay();
  const learned = useQuery({ ...runLearnedQuery(run.id), enabled: isOver && may('batches:read') });
  if (!isOver) return null;
  return (
    <section aria-labelledby="learned" className="grid min-w-0 gap-4">
      <LevelRule id="learned">What this run taught</LevelRule>
      {learned.data ? (
        <Lessons learned={learned.data} kit={kit} />
      ) : learned.error ? (
        <Failed title="What it taught could not be fetched" onRetry={() => void learned.refetch()}>
          {failureWords(learned.error)}
        </Failed>
      ) : (
        <Waiting>Going through the readings.</Waiting>
      )}
    </section>
  );
}

function Lessons({ learned, kit }: { learned: RunLearned; kit: BatchKit | null }) {
  return (
    <>
      <p className="max-w-[60ch] text-body text-soft">
        {learned.isRehearsal
          ? 'This was a rehearsal: it shows how the kettle of the simulation behaves, and teaches nothing about yours.'
          : 'What you save here counts from the next run on. Nothing is saved by itself.'}
      </p>
      {kit && !learned.isRehearsal ? (
        <RealLessons learned={learned} kit={kit} />
      ) : (
        <ul>
          {kitLessons.map((kind) => (
            <Line key={kind} words={lessonWords(kind, learned[kind])} />
          ))}
        </ul>
      )}
    </>
  );
}

const kitLessons: readonly KitLesson[] = ['lagS', 'coolingPerS', 'chillingPerS', 'heaterEfficiency'];
const saveWords: Record<KitLesson, string> = {
  lagS: 'Save to the probe',
  coolingPerS: 'Save to the kettle',
  chillingPerS: 'Save to the chiller',
  heaterEfficiency: 'Save to the kettle',
};

function RealLessons({ learned, kit }: { learned: RunLearned; kit: BatchKit }) {
  const may = useMay();
  const { member } = useKnown();
  const equipment = useQuery({ ...equipmentQuery, enabled: may('equipment:read') });
  const probes = useQuery({ ...probesQuery, enabled: may('probes:read') });
  const save = useSaveLesson(kit, learned);
  const saveReach = useSaveReach(learned.runId);
  const failure = save.error ?? saveReach.error;

  const actOf = (kind: KitLesson) => {
    const lesson = learned[kind].learned;
    if (!lesson || !may(kind === 'lagS' ? 'probes:manage' : 'equipment:manage')) return null;
    const inUse = inUseOf(kind, kit, equipment.data ?? [], probes.data ?? []);
    if (inUse === undefined) return null;
    if (inUse === keptValue(kind, lesson.value)) return <InUse />;
    return (
      <Button
        aria-label={`${saveWords[kind]}: ${lessonWords(kind, learned[kind]).name}`}
        isBusy={save.isPending && save.variables === kind}
        busyLabel="Saving"
        onClick={() => save.mutate(kind)}
      >
        {saveWords[kind]}
      </Button>
    );
  };
  return (
    <>
      {failure ? (
        <Banner tone="act" title="It was not saved">
          {failureWords(failure)}
        </Banner>
      ) : null}
      <ul>
        {kitLessons.map((kind) => (
          <Line key={kind} words={lessonWords(kind, learned[kind])} act={actOf(kind)} />
        ))}
        {learned.reach.map((lesson) => {
          const { memberId, reachS, toldS } = lesson;
          const isOwn = memberId === member.id && reachS !== null;
          const act = !isOwn ? null : reachS === toldS ? (
            <InUse />
          ) : (
            <Button
              isBusy={saveReach.isPending}
              busyLabel="Saving"
              onClick={() => saveReach.mutate({ reachS, beforeS: toldS })}
            >
              Time my calls so
            </Button>
          );
          return <Line key={memberId} words={reachWords(lesson)} act={act} />;
        })}
      </ul>
    </>
  );
}

/** What the house has written down now; null: nothing, undefined: the piece is no longer there. */
function inUseOf(
  kind: KitLesson,
  kit: BatchKit,
  equipment: readonly Equipment[],
  probes: readonly Probe[],
): number | null | undefined {
  if (kind === 'lagS') return probes.find(({ id }) => id === kit.probeId)?.lagS;
  const piece = equipment.find(({ id }) => id === (kind === 'chillingPerS' ? kit.chillerId : kit.kettleId));
  if (piece?.kind === 'chiller') return piece.facts.coolingConstantPerS ?? null;
  if (piece?.kind !== 'kettle') return undefined;
  return kind === 'heaterEfficiency' ? piece.facts.heaterEfficiency : (piece.facts.coolingConstantPerS ?? null);
}

function InUse() {
  return <span className="inline-flex min-h-12 items-center text-body text-soft">In use</span>;
}

/** One thing: what was told, what was learned, and the one act. */
function Line({ words: { name, told, learned, note }, act }: { words: LessonWords; act?: ReactNode }) {
  return (
    <li className="grid gap-x-8 gap-y-1 border-b border-hair py-4 md:grid-cols-[minmax(0,1.1fr)_minmax(0,1.4fr)_13rem] md:items-center">
      <div>
        <p className="text-body font-medium">{name}</p>
        <p className="text-body text-soft tabular-nums">{told}</p>
      </div>
      {learned === null ? (
        <p className="max-w-prose text-body text-soft">{note}</p>
      ) : (
        <p className="flex flex-wrap items-baseline gap-x-3 tabular-nums">
          <span className="text-title font-medium">{learned}</span>
          <span className="text-body text-soft">{note}</span>
        </p>
      )}
      <div className="mt-2 empty:hidden md:mt-0 md:text-right">{act}</div>
    </li>
  );
}
