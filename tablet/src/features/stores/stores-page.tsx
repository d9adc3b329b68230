import { useState } from 'react';
import { useMutation, useQuery } from '@tanstack/react-query';
import type { Ingredient } from '@steepfall/shared/contracts';
import { format } from 'date-fns';
import { useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { Menu } from '#components/menu.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { fetchHubFile } from '#lib/api-client.ts';
import { storesQuery } from '#lib/hub-queries.ts';
import { saveFile } from '#lib/save-file.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords } from '#lib/words.ts';
import { AddIngredientDialog } from './ingredient-form.tsx';
import { ReceiveLotDialog } from './lot-form.tsx';
import { RemovedDialog } from './removed-dialog.tsx';
import { StoresTable } from './stores-table.tsx';

type Asked = { act: 'add' | 'removed' } | { act: 'receive'; ingredient: Ingredient };

/** The shelf: what there is, what of it is spoken for, and what should be used first. */
export function StoresPage() {
  const { house } = useKnown();
  const may = useMay();
  const navigate = useNavigate();
  const stores = useQuery({ ...storesQuery, refetchInterval: 30_000 });
  const [asked, setAsked] = useState<Asked | null>(null);
  const takeOut = useMutation({
    mutationFn: () => fetchHubFile('stores/export'),
    onSuccess: (list) => saveFile(list, `stores-${format(new Date(), 'yyyy-MM-dd')}.csv`),
  });
  const mayManage = may('stores:manage');
  const close = () => setAsked(null);
  const isEmpty = stores.data?.length === 0;
  return (
    <Page
      title="Stores"
      above={house.name}
      lead="What is on the shelf, lot by lot: what is left, what is set aside, what to use first."
      action={
        <div className="flex flex-wrap items-center gap-3">
          {mayManage ? (
            <Button look="primary" size="sheet" onClick={() => setAsked({ act: 'add' })}>
              Add an ingredient
            </Button>
          ) : null}
          <Menu
            label="More"
            choices={[
              ...(mayManage
                ? [{ label: 'Bring in a list (CSV)', onChoose: () => void navigate('/stores/import') }]
                : []),
              { label: 'Save as a list (CSV)', onChoose: () => takeOut.mutate() },
              ...(mayManage ? [{ label: 'What was taken out', onChoose: () => setAsked({ act: 'removed' }) }] : []),
            ]}
          />
        </div>
      }
    >
      {takeOut.error ? (
        <Banner tone="act" title="The list was not saved">
          {failureWords(takeOut.error)}
        </Banner>
      ) : null}
      {stores.error ? (
        <Failed title="The stores may be old" onRetry={() => void stores.refetch()}>
          {failureWords(stores.error)}
        </Failed>
      ) : null}
      {stores.isPending ? <Waiting>Looking at the shelf.</Waiting> : null}
      {isEmpty ? (
        <EmptyState
          action={
            mayManage ? (
              <div className="flex flex-wrap gap-3">
                <Button look="primary" onClick={() => setAsked({ act: 'add' })}>
                  Add an ingredient
                </Button>
                <Button onClick={() => void navigate('/stores/import')}>Bring in a list</Button>
              </div>
            ) : null
          }
        >
          The shelf is empty. Add what you brew with once; then every delivery is a lot, and a batch sets aside what it
          needs and knows what it cost.
        </EmptyState>
      ) : null}
      {stores.data && !isEmpty ? (
        <StoresTable
          ingredients={stores.data}
          onReceive={mayManage ? (ingredient) => setAsked({ act: 'receive', ingredient }) : null}
        />
      ) : null}
      {asked?.act === 'add' ? <AddIngredientDialog onClose={close} /> : null}
      {asked?.act === 'receive' ? <ReceiveLotDialog ingredient={asked.ingredient} onClose={close} /> : null}
      {asked?.act === 'removed' ? <RemovedDialog onClose={close} /> : null}
    </Page>
  );
}
