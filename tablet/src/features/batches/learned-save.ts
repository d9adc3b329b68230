import { useMutation, useQueryClient, type QueryClient } from '@tanstack/react-query';
import {
  equipmentSchema,
  memberSchema,
  probeSchema,
  type Batch,
  type Equipment,
  type RunLearned,
} from '@steepfall/shared/contracts';
import { callHubFor } from '#lib/api-client.ts';
import { equipmentQuery, probesQuery, runLearnedQuery } from '#lib/hub-queries.ts';
import { noteMember } from '#lib/session.ts';
import { offerUndo } from '#lib/undo.ts';
import type { KitLesson } from './learned-words.ts';

/** The kit that a batch was brewed on. */
export type BatchKit = Pick<Batch, 'kettleId' | 'chillerId' | 'probeId'>;

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
type Chiller = Extract<Equipment, { kind: 'chiller' }>;

/** What is kept has no false digits. */
export function keptValue(kind: KitLesson, value: number): number {
  if (kind === 'lagS') return Number(value.toFixed(1));
  return kind === 'heaterEfficiency' ? Number(value.toFixed(2)) : Number(value.toPrecision(3));
}

/** Saves what was learned where it belongs, and offers to take that back. Whatever else is written down there stays. */
export function useSaveLesson(kit: BatchKit, learned: RunLearned) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (kind: KitLesson) => {
      const lesson = learned[kind].learned;
      if (!lesson) return;
      const value = keptValue(kind, lesson.value);
      const undo =
        kind === 'lagS'
          ? await saveLag(client, kit.probeId, value, lesson.error / lesson.value)
          : kind === 'chillingPerS'
            ? await saveChiller(client, kit.chillerId, value)
            : await saveKettle(client, kit.kettleId, kind === 'coolingPerS' ? 'coolingConstantPerS' : kind, value);
      offerUndo(savedWords[kind], undo);
    },
  });
}

const savedWords: Record<KitLesson, string> = {
  lagS: 'The lag is saved with the probe.',
  coolingPerS: 'Its cooling is saved with the kettle.',
  chillingPerS: 'Its cooling is saved with the chiller.',
  heaterEfficiency: 'The share is saved with the kettle.',
};

/** Largest error that the watch makes use of. */
const LARGEST_RATIO = 0.25;

async function saveLag(client: QueryClient, id: string | null, lagS: number, ratio: number) {
  const save = async (change: { lagS: number; lagErrorRatio: number | null }) => {
    const all = await client.fetchQuery({ ...probesQuery, staleTime: 0 });
    const probe = all.find((one) => one.id === id);
    if (!probe) throw new Error('This probe is no longer in the house.');
    const { name, resolutionC, samplePeriodS, calibration, version } = probe;
    const body = { name, resolutionC, samplePeriodS, calibration, version, ...change };
    await callHubFor(probeSchema, `probes/${probe.id}`, { method: 'PATCH', body });
    await client.invalidateQueries({ queryKey: probesQuery.queryKey });
    return { lagS: probe.lagS, lagErrorRatio: probe.lagErrorRatio };
  };
  const before = await save({ lagS, lagErrorRatio: Number(Math.min(LARGEST_RATIO, ratio).toFixed(3)) });
  return () => save(before);
}

async function changePiece(client: QueryClient, id: string | null, change: (piece: Equipment) => Equipment['facts']) {
  const all = await client.fetchQuery({ ...equipmentQuery, staleTime: 0 });
  const piece = all.find((one) => one.id === id);
  if (!piece) throw new Error('This is no longer among the kit of the house.');
  const { kind, name, version } = piece;
  const body = { kind, name, version, facts: change(piece) };
  await callHubFor(equipmentSchema, `equipment/${piece.id}`, { method: 'PATCH', body });
  await client.invalidateQueries({ queryKey: equipmentQuery.queryKey });
  return piece;
}

async function saveKettle(
  client: QueryClient,
  id: string,
  member: 'coolingConstantPerS' | 'heaterEfficiency',
  value: number,
) {
  const save = async (next: number | undefined) =>
    (await changePiece(client, id, ({ facts }) => ({ ...facts, [member]: next }))) as Kettle;
  const before = await save(value);
  return () => save(before.facts[member]);
}

async function saveChiller(client: QueryClient, id: string | null, value: number) {
  const save = async (next: number | undefined) =>
    (await changePiece(client, id, ({ facts }) => ({ ...facts, coolingConstantPerS: next }))) as Chiller;
  const before = await save(value);
  return () => save(before.facts.coolingConstantPerS);
}

/** A person's own reach: nobody else saves it for them. */
export function useSaveReach(runId: string) {
  const client = useQueryClient();
  const save = async (reachS: number | null) => {
    noteMember(await callHubFor(memberSchema, 'me/reach', { method: 'PATCH', body: { reachS } }));
    await client.invalidateQueries({ queryKey: runLearnedQuery(runId).queryKey });
  };
  return useMutation({
    mutationFn: async ({ reachS, beforeS }: { reachS: number; beforeS: number | null }) => {
      await save(reachS);
      offerUndo(`From the next run you start, calls come ${reachS} s before.`, () => save(beforeS));
    },
  });
}
