import { QueryClient } from '@tanstack/react-query';
import { HubProblemError } from './http.ts';

/**
 * For what is edited in calm and online: recipes, batches, the house. A run is never rendered from here.
 * `networkMode` is `always`, since a hub on the kitchen network works without the Internet.
 */
export const queryClient = new QueryClient({
  defaultOptions: {
    queries: {
      networkMode: 'always',
      staleTime: 5_000,
      retry: (count, error) => !(error instanceof HubProblemError && error.problem.status < 500) && count < 2,
    },
    mutations: { networkMode: 'always', retry: false },
  },
});
