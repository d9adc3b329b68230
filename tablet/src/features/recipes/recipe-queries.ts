import { queryOptions } from '@tanstack/react-query';
import { recipeSummarySchema } from '@steepfall/shared/contracts';
import { z } from 'zod';
import { callHubFor } from '#lib/api-client.ts';

export const archivedRecipesQuery = queryOptions({
  queryKey: ['recipes', 'archived'],
  queryFn: ({ signal }) => callHubFor(z.array(recipeSummarySchema), 'recipes', { signal, query: { archived: 'true' } }),
});
