import { queryOptions } from '@tanstack/react-query';
import {
  batchPlanSchema,
  batchSchema,
  equipmentSchema,
  houseSchema,
  ingredientSchema,
  lotMoveSchema,
  memberSchema,
  probeSchema,
  recipeSchema,
  recipeSummarySchema,
  runLearnedSchema,
  runReadingsSchema,
  runSummarySchema,
  type RunReadingsQuery,
} from '@steepfall/shared/contracts';
import type { LogEntry } from '@steepfall/shared/runs';
import { z } from 'zod';
import { callHubFor, fetchHubFile } from './api-client.ts';

/** An event as the log shows it: the envelope is checked, the rest is the fold's business, so that newer types come through. */
const storedEntrySchema = z.looseObject({
  id: z.string(),
  runId: z.string(),
  type: z.string(),
  v: z.number(),
  atMs: z.number(),
  by: z.string().nullable(),
  station: z.string(),
  seq: z.number(),
  receivedAtMs: z.number(),
  sentBy: z.string().nullable(),
  payload: z.unknown(),
});
export type StoredEntry = LogEntry & Pick<z.infer<typeof storedEntrySchema>, 'seq' | 'receivedAtMs' | 'sentBy'>;
const logSchema = z.object({ runId: z.string(), events: z.array(storedEntrySchema) });

export const houseQuery = queryOptions({
  queryKey: ['house'],
  queryFn: ({ signal }) => callHubFor(houseSchema, 'house', { signal }),
});

export const membersQuery = queryOptions({
  queryKey: ['members'],
  queryFn: ({ signal }) => callHubFor(z.array(memberSchema), 'members', { signal }),
});

export const equipmentQuery = queryOptions({
  queryKey: ['equipment'],
  queryFn: ({ signal }) => callHubFor(z.array(equipmentSchema), 'equipment', { signal }),
});

/** What was removed from the house, and can come back. */
export const removedEquipmentQuery = queryOptions({
  queryKey: ['equipment', 'removed'],
  queryFn: ({ signal }) => callHubFor(z.array(equipmentSchema), 'equipment', { signal, query: { removed: 'true' } }),
});

export const probesQuery = queryOptions({
  queryKey: ['probes'],
  queryFn: ({ signal }) => callHubFor(z.array(probeSchema), 'probes', { signal }),
});

export const recipesQuery = queryOptions({
  queryKey: ['recipes'],
  queryFn: ({ signal }) => callHubFor(z.array(recipeSummarySchema), 'recipes', { signal }),
});

export function recipeQuery(recipeId: string) {
  return queryOptions({
    queryKey: ['recipes', recipeId],
    queryFn: ({ signal }) => callHubFor(recipeSchema, `recipes/${recipeId}`, { signal }),
  });
}

export const batchesQuery = queryOptions({
  queryKey: ['batches'],
  queryFn: ({ signal }) => callHubFor(z.array(batchSchema), 'batches', { signal }),
});

/** Batches that were cancelled: they can come back. */
export const cancelledBatchesQuery = queryOptions({
  queryKey: ['batches', 'cancelled'],
  queryFn: ({ signal }) => callHubFor(z.array(batchSchema), 'batches', { signal, query: { cancelled: 'true' } }),
});

export function batchQuery(batchId: string) {
  return queryOptions({
    queryKey: ['batches', batchId],
    queryFn: ({ signal }) => callHubFor(batchSchema, `batches/${batchId}`, { signal }),
  });
}

export function batchPlanQuery(batchId: string) {
  return queryOptions({
    queryKey: ['batches', batchId, 'plan'],
    queryFn: ({ signal }) => callHubFor(batchPlanSchema, `batches/${batchId}/plan`, { signal }),
  });
}

/** Everything on the shelf, each with its lots. */
export const storesQuery = queryOptions({
  queryKey: ['stores'],
  queryFn: ({ signal }) => callHubFor(z.array(ingredientSchema), 'stores', { signal }),
});

export const removedStoresQuery = queryOptions({
  queryKey: ['stores', 'removed'],
  queryFn: ({ signal }) => callHubFor(z.array(ingredientSchema), 'stores', { signal, query: { removed: 'true' } }),
});

/** The ledger of a lot, newest first. */
export function lotMovesQuery(lotId: string) {
  return queryOptions({
    queryKey: ['stores', 'lots', lotId, 'moves'],
    queryFn: ({ signal }) => callHubFor(z.array(lotMoveSchema), `stores/lots/${lotId}/moves`, { signal }),
  });
}

/** The photo of a label. A lot gets a new version with a new photo, so that the old one is not shown for it. */
export function lotPhotoQuery({ id, version }: { id: string; version: number }) {
  return queryOptions({
    queryKey: ['label-photos', id, version],
    queryFn: ({ signal }) => fetchHubFile(`stores/lots/${id}/photo`, { signal }),
    staleTime: Infinity,
  });
}

export const runningRunsQuery = queryOptions({
  queryKey: ['runs', 'running'],
  queryFn: ({ signal }) => callHubFor(z.array(runSummarySchema), 'runs', { signal, query: { status: 'running' } }),
});

export const endedRunsQuery = queryOptions({
  queryKey: ['runs', 'ended'],
  queryFn: ({ signal }) => callHubFor(z.array(runSummarySchema), 'runs', { signal, query: { status: 'ended' } }),
});

export function runQuery(runId: string) {
  return queryOptions({
    queryKey: ['runs', runId],
    queryFn: ({ signal }) => callHubFor(runSummarySchema, `runs/${runId}`, { signal }),
  });
}

/** The log of a run for looking at afterwards. The run sheet keeps its own copy and never reads this one. */
export function runLogQuery(runId: string) {
  return queryOptions({
    queryKey: ['runs', runId, 'log'],
    queryFn: async ({ signal }): Promise<StoredEntry[]> => {
      const { events } = await callHubFor(logSchema, `runs/${runId}/events`, { signal });
      return events;
    },
  });
}

/** What a run that is over teaches; it stays the same, save what its people are told by now. */
export function runLearnedQuery(runId: string) {
  return queryOptions({
    queryKey: ['runs', runId, 'learned'],
    queryFn: ({ signal }) => callHubFor(runLearnedSchema, `runs/${runId}/learned`, { signal }),
  });
}

export function runReadingsQuery(runId: string, window: RunReadingsQuery) {
  return queryOptions({
    queryKey: ['runs', runId, 'readings', window],
    queryFn: ({ signal }) => callHubFor(runReadingsSchema, `runs/${runId}/readings`, { signal, query: { ...window } }),
  });
}

/** The last minutes of a running run: where to begin is asked anew each time, so the key stays the same. */
export function recentReadingsQuery(runId: string, fromMsAt: (nowMs: number) => number) {
  return queryOptions({
    queryKey: ['runs', runId, 'readings', 'recent'],
    queryFn: ({ signal }) =>
      callHubFor(runReadingsSchema, `runs/${runId}/readings`, { signal, query: { fromMs: fromMsAt(Date.now()) } }),
  });
}
