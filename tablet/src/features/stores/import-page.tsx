import { useEffect, useState, type ReactNode } from 'react';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import {
  importPreviewSchema,
  importStoresSchema,
  importedStoresSchema,
  type ImportPreview,
  type ImportedStores,
} from '@steepfall/shared/contracts';
import { storesColumns } from '@steepfall/shared/stores';
import { Link } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button, ButtonLink } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Page } from '#components/page.tsx';
import { ShapeGlyph } from '#components/shapes.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { storesQuery } from '#lib/hub-queries.ts';
import { saveFile } from '#lib/save-file.ts';
import { failureWords, fieldProblems, listWords } from '#lib/words.ts';
import { csvTemplate } from './csv-template.ts';
import { FileDrop } from './file-drop.tsx';
import { ImportTable } from './import-table.tsx';
import { readListFile } from './read-list-file.ts';

interface Chosen {
  name: string;
  csv: string;
  preview: ImportPreview;
}

/** A list from elsewhere: looked at row by row first, and nothing is written before every row is right or left out on purpose. */
export function ImportPage() {
  const client = useQueryClient();
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const [skipRows, setSkipRows] = useState<ReadonlySet<number>>(new Set());
  const look = useMutation({
    mutationFn: async (file: File): Promise<Chosen> => {
      const csv = await readListFile(file);
      const body = importStoresSchema.safeParse({ csv, skipRows: [] });
      if (!body.success) throw new ListError(body.error.issues[0]?.message ?? 'The file cannot be read.');
      const request = { method: 'POST', body: body.data } as const;
      return { name: file.name, csv, preview: await callHubFor(importPreviewSchema, 'stores/import/preview', request) };
    },
    onMutate: () => setChosen(null),
    onSuccess: (next) => {
      setSkipRows(new Set());
      bringIn.reset();
      setChosen(next);
    },
  });
  const bringIn = useMutation({
    mutationFn: (list: Chosen) =>
      callHubFor(importedStoresSchema, 'stores/import', {
        method: 'POST',
        body: { csv: list.csv, skipRows: [...skipRows].toSorted((a, b) => a - b) },
      }),
    onSuccess: () => void client.invalidateQueries({ queryKey: storesQuery.queryKey }),
  });
  if (bringIn.data) return <Imported result={bringIn.data} onAgain={() => bringIn.reset()} />;
  return (
    <Page
      title="Bring in a list"
      above={
        <Link
          to="/stores"
          className="inline-flex min-h-12 items-center underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
        >
          Stores
        </Link>
      }
      lead="A spreadsheet saved as CSV, one row a lot. It is looked at first; nothing is written until you say so."
      action={
        <Button onClick={() => saveFile(new Blob([csvTemplate()], { type: 'text/csv' }), 'stores-template.csv')}>
          Save a template
        </Button>
      }
    >
      <div className="grid gap-4">
        <FileDrop
          label={chosen ? `${chosen.name}. Choose another file, or the same after mending it` : 'Choose the file'}
          isBusy={look.isPending}
          onFile={(file) => look.mutate(file)}
        />
        {look.error ? <FileError error={look.error} /> : null}
      </div>
      {chosen ? (
        <Preview
          preview={chosen.preview}
          skipRows={skipRows}
          onSkip={setSkipRows}
          act={
            <Button
              look="primary"
              size="sheet"
              disabled={openCount(chosen.preview, skipRows) > 0 || takenCount(chosen.preview, skipRows) === 0}
              isBusy={bringIn.isPending}
              busyLabel="Bringing it in"
              onClick={() => bringIn.mutate(chosen)}
            >
              Bring in {rowWords(takenCount(chosen.preview, skipRows))}
            </Button>
          }
        />
      ) : (
        <Columns />
      )}
      {bringIn.error ? (
        <Banner tone="act" title="Nothing was brought in">
          {failureWords(bringIn.error)}
        </Banner>
      ) : null}
    </Page>
  );
}

/** Said by this page of a file that never went to the hub. */
class ListError extends Error {}

function FileError({ error }: { error: Error }) {
  const details = error instanceof ListError ? [error.message] : fieldProblems(error).map(({ detail }) => detail);
  return (
    <div role="alert" className="flex gap-3 text-body font-medium text-ember">
      <ShapeGlyph shape="diamond" className="mt-1.5 size-3.5 shrink-0" />
      <ul className="grid gap-1">
        {(details.length > 0 ? details : [failureWords(error)]).map((detail) => (
          <li key={detail}>{detail}</li>
        ))}
      </ul>
    </div>
  );
}

const isBad = ({ problems }: ImportPreview['rows'][number]) => problems.length > 0;
const rowWords = (count: number) => (count === 1 ? '1 row' : `${count} rows`);

function openCount({ rows }: ImportPreview, skipRows: ReadonlySet<number>): number {
  return rows.filter((row) => isBad(row) && !skipRows.has(row.row)).length;
}

function takenCount({ rows }: ImportPreview, skipRows: ReadonlySet<number>): number {
  return rows.filter((row) => !isBad(row) && !skipRows.has(row.row)).length;
}

interface PreviewProps {
  preview: ImportPreview;
  skipRows: ReadonlySet<number>;
  onSkip: (rows: ReadonlySet<number>) => void;
  act: ReactNode;
}

function Preview({ preview, skipRows, onSkip, act }: PreviewProps) {
  const open = openCount(preview, skipRows);
  return (
    <section aria-labelledby="rows" className="grid gap-5">
      <LevelRule id="rows" aside={`${preview.goodCount} good, ${preview.badCount} to mend`}>
        The rows
      </LevelRule>
      <ImportTable rows={preview.rows} skipRows={skipRows} onSkip={onSkip} />
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3">
        {act}
        <p role="status" className="min-w-60 flex-1 text-body">
          {open > 0
            ? `${rowWords(open)} still to mend in the file, or to leave out on purpose. Until then nothing is brought in.`
            : skipRows.size > 0
              ? `${rowWords(skipRows.size)} left out on purpose.`
              : 'Every row is right.'}
        </p>
        {open > 0 ? (
          <Button onClick={() => onSkip(new Set([...skipRows, ...preview.rows.filter(isBad).map(({ row }) => row)]))}>
            Leave out all that are not right
          </Button>
        ) : null}
      </div>
    </section>
  );
}

function Columns() {
  return (
    <section aria-labelledby="columns" className="grid gap-4">
      <LevelRule id="columns">The columns</LevelRule>
      <p className="max-w-prose text-body text-soft">
        In any order. Only kind and name are needed; the template has them all. Empty cells are what nobody knows.
      </p>
      <dl className="grid gap-x-12 sm:grid-cols-2">
        {storesColumns.map(({ name, meaning, example }) => (
          <div
            key={name}
            className="grid grid-cols-[8.5rem_minmax(0,1fr)] items-baseline gap-x-4 border-b border-hair py-2.5"
          >
            <dt className="font-medium">{name}</dt>
            <dd className="text-soft">
              {meaning}, <span className="text-text">such as {example}</span>
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

function importedWords({ ingredientCount, lotCount, skippedCount }: ImportedStores): string {
  const count = (number: number, one: string, many: string) =>
    number === 0 ? [] : [`${number} ${number === 1 ? one : many}`];
  const came = [...count(ingredientCount, 'new ingredient', 'new ingredients'), ...count(lotCount, 'lot', 'lots')];
  const left = count(skippedCount, 'row was', 'rows were').map((rows) => ` ${rows} left out on purpose.`);
  return `${came.length > 0 ? listWords(came) : 'Nothing new'} came in.${left.join('')}`;
}

function Imported({ result, onAgain }: { result: ImportedStores; onAgain: () => void }) {
  // The page turned without a change of place: whoever listens is taken to the result.
  useEffect(() => document.querySelector('h1')?.focus(), []);
  return (
    <Page title="It is on the shelf" above="Stores" lead={importedWords(result)}>
      <div className="flex flex-wrap gap-3">
        <ButtonLink look="primary" to="/stores">
          Look at the stores
        </ButtonLink>
        <Button onClick={onAgain}>Bring in another list</Button>
      </div>
    </Page>
  );
}
