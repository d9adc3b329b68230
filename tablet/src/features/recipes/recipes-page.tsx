import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { EmptyState } from '#components/empty-state.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { recipesQuery } from '#lib/hub-queries.ts';
import { useKnown } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';

export function RecipesPage() {
  const { house } = useKnown();
  const recipes = useQuery(recipesQuery);
  return (
    <Page
      title="Recipes"
      above={house.name}
      lead="A recipe is a chain of revisions. A batch is made from one of them and stays with it."
    >
      {recipes.error ? (
        <Failed title="The recipes may be old" onRetry={() => void recipes.refetch()}>
          {failureWords(recipes.error)}
        </Failed>
      ) : null}
      {recipes.data && recipes.data.length > 0 ? (
        <ul>
          {recipes.data.map(({ id, name, summary, latestRevisionNumber }) => (
            <li key={id} className="border-t-2 border-hair first:border-t-4 first:border-text">
              <Link
                to={`/recipes/${id}`}
                className="group flex flex-wrap items-baseline justify-between gap-x-10 gap-y-2 py-7"
              >
                <span className="min-w-0 flex-1 basis-72">
                  <span className="block text-title group-hover:underline group-hover:decoration-2 group-hover:underline-offset-4">
                    {name}
                  </span>
                  <span className="mt-2 block max-w-prose text-lead text-soft">{summary}</span>
                </span>
                <span className="text-body tabular-nums text-soft">revision {latestRevisionNumber}</span>
              </Link>
            </li>
          ))}
        </ul>
      ) : recipes.data ? (
        <EmptyState>There is no recipe yet. The brewer writes the first one.</EmptyState>
      ) : recipes.isPending ? (
        <Waiting>Fetching the recipes.</Waiting>
      ) : null}
    </Page>
  );
}
