import { useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { createColumnHelper } from '@tanstack/react-table';
import type { RecipeSummary } from '@steepfall/shared/contracts';
import { formatVolume } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Link, useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { ButtonLink } from '#components/button.tsx';
import { DataTable } from '#components/data-table.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { TextField } from '#components/field.tsx';
import { Menu, type MenuChoice } from '#components/menu.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { Segmented } from '#components/segmented.tsx';
import { useListTable } from '#components/use-list-table.ts';
import { recipesQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { readDraft } from './drafts.ts';
import { archivedRecipesQuery } from './recipe-queries.ts';
import { useArchive } from './use-archive.ts';

type Shelf = 'in-use' | 'archived';
const shelves: { value: Shelf; label: string }[] = [
  { value: 'in-use', label: 'In use' },
  { value: 'archived', label: 'Archived' },
];

export function RecipesPage() {
  const { house } = useKnown();
  const may = useMay();
  const [shelf, setShelf] = useState<Shelf>('in-use');
  const inUse = useQuery(recipesQuery);
  const archived = useQuery({ ...archivedRecipesQuery, enabled: shelf === 'archived' });
  const recipes = shelf === 'archived' ? archived : inUse;
  const mayEdit = may('recipes:manage');
  return (
    <Page
      title="Recipes"
      above={house.name}
      lead="What this house brews. Each save is a revision of its own; a batch keeps the one it was brewed from."
      action={
        mayEdit ? (
          <ButtonLink look="primary" to="/recipes/new">
            New recipe
          </ButtonLink>
        ) : null
      }
    >
      {recipes.error ? (
        <Failed title="The recipes could not be fetched" onRetry={() => void recipes.refetch()}>
          {failureWords(recipes.error)}
        </Failed>
      ) : null}
      {recipes.data ? (
        <Shelves key={shelf} recipes={recipes.data} shelf={shelf} onShelf={setShelf} mayEdit={mayEdit} />
      ) : recipes.isPending ? (
        <Waiting>Fetching the recipes.</Waiting>
      ) : null}
    </Page>
  );
}

const column = createColumnHelper<RecipeSummary>();

interface ShelvesProps {
  recipes: readonly RecipeSummary[];
  shelf: Shelf;
  onShelf: (shelf: Shelf) => void;
  mayEdit: boolean;
}

function Shelves({ recipes, shelf, onShelf, mayEdit }: ShelvesProps) {
  const units = useUnits();
  const archive = useArchive();
  const { mutate } = archive;
  const data = useMemo(() => [...recipes], [recipes]);
  const columns = useMemo(
    () => [
      column.accessor(({ name, summary }) => `${name} ${summary}`, {
        id: 'name',
        header: 'Recipe',
        meta: { isLead: true },
        cell: ({ row: { original } }) => <NameCell recipe={original} />,
      }),
      column.accessor('volumeL', {
        header: 'Volume',
        enableGlobalFilter: false,
        meta: { isNumber: true },
        cell: ({ getValue }) => formatVolume(getValue(), { unit: units.volume }),
      }),
      column.accessor('latestRevisionNumber', {
        header: 'Revision',
        enableGlobalFilter: false,
        meta: { isNumber: true },
      }),
      column.accessor('changedAtMs', {
        header: 'Changed',
        enableGlobalFilter: false,
        cell: ({ getValue }) => (getValue() > 0 ? format(getValue(), 'd MMMM yyyy') : '–'),
      }),
      ...(mayEdit
        ? [
            column.display({
              id: 'acts',
              header: () => <span className="sr-only">What can be done</span>,
              cell: ({ row: { original } }) => (
                <RowMenu
                  recipe={original}
                  onArchive={(isArchived) => mutate({ id: original.id, name: original.name, isArchived })}
                />
              ),
            }),
          ]
        : []),
    ],
    [units.volume, mayEdit, mutate],
  );
  const { table, words, setWords } = useListTable({ data, columns, orderAtFirst: [{ id: 'changedAtMs', desc: true }] });
  return (
    <div className="grid gap-6">
      <div className="flex flex-wrap items-end gap-x-8 gap-y-5">
        <div className="w-full max-w-sm">
          <TextField
            label="Find"
            type="search"
            placeholder="a name, or a word of it"
            value={words}
            onChange={({ target }) => setWords(target.value)}
          />
        </div>
        <Segmented label="Show" value={shelf} onChange={onShelf} segments={shelves} />
      </div>
      {archive.isError ? (
        <Banner tone="act" title="That did not happen">
          {failureWords(archive.error)}
        </Banner>
      ) : null}
      {recipes.length === 0 ? (
        <NoRecipes shelf={shelf} mayEdit={mayEdit} />
      ) : table.getRowModel().rows.length > 0 ? (
        <DataTable table={table} caption="Recipes of this house" countWord="recipes" />
      ) : (
        <p role="status" className="py-6 text-lead text-soft">
          No recipe fits. Take a word out, or look among the {shelf === 'archived' ? 'ones in use' : 'archived ones'}.
        </p>
      )}
    </div>
  );
}

function NoRecipes({ shelf, mayEdit }: { shelf: Shelf; mayEdit: boolean }) {
  if (shelf === 'archived') {
    return (
      <EmptyState>Nothing is archived. A recipe that is put away keeps its revisions and can come back.</EmptyState>
    );
  }
  return (
    <EmptyState
      action={
        mayEdit ? (
          <ButtonLink look="primary" to="/recipes/new">
            Write the first recipe
          </ButtonLink>
        ) : null
      }
    >
      A recipe is a water, a tea, some hops and a planned day. Write them down, and the desk works out the rest as you
      type.
    </EmptyState>
  );
}

function NameCell({ recipe: { id, name, summary } }: { recipe: RecipeSummary }) {
  const { house, member } = useKnown();
  const isUnsaved = readDraft({ houseId: house.id, memberId: member.id }, id) !== null;
  return (
    <span className="block min-w-0 py-1">
      <Link
        to={`/recipes/${id}`}
        className="inline-flex min-h-12 items-center text-lead font-semibold underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
      >
        {name}
      </Link>
      <span className="block max-w-prose text-note text-soft">{summary}</span>
      {isUnsaved ? <span className="block text-note font-medium">Your changes are not saved yet.</span> : null}
    </span>
  );
}

function RowMenu({ recipe, onArchive }: { recipe: RecipeSummary; onArchive: (isArchived: boolean) => void }) {
  const navigate = useNavigate();
  const { id, name, isArchived } = recipe;
  const inUse: MenuChoice[] = [
    { label: 'Change', onChoose: () => void navigate(`/recipes/${id}/edit`) },
    { label: 'Copy', onChoose: () => void navigate(`/recipes/new?copy=${id}`) },
    { label: 'Archive', onChoose: () => onArchive(true) },
  ];
  const away: MenuChoice[] = [{ label: 'Bring back', onChoose: () => onArchive(false) }];
  return (
    <Menu
      label={
        <>
          <span aria-hidden="true">⋯</span>
          <span className="sr-only">More for {name}</span>
        </>
      }
      choices={isArchived ? away : inUse}
    />
  );
}
