import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Ingredient } from '@steepfall/shared/contracts';
import { formatMass } from '@steepfall/shared/units';
import { format } from 'date-fns';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { Button, ButtonLink } from '#components/button.tsx';
import { EmptyState } from '#components/empty-state.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { Page } from '#components/page.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { storesQuery } from '#lib/hub-queries.ts';
import { useMay } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { factsWords, kindWords, lowWords } from './facts-words.ts';
import { EditIngredientDialog } from './ingredient-form.tsx';
import { ReceiveLotDialog } from './lot-form.tsx';
import { LotSection } from './lot-section.tsx';
import { marksOf } from './stock-marks.ts';
import { useRemove } from './use-stores.ts';

export function IngredientPage() {
  const { ingredientId = '' } = useParams();
  const stores = useQuery({ ...storesQuery, refetchInterval: 30_000 });
  const ingredient = stores.data?.find(({ id }) => id === ingredientId);
  if (ingredient) return <IngredientView ingredient={ingredient} />;
  return (
    <Page title={stores.data ? 'Not on the shelf' : 'Stores'}>
      {stores.data ? (
        <EmptyState action={<ButtonLink to="/stores">Go to the stores</ButtonLink>}>
          This ingredient is not in the stores, or was taken out of them. The stores can bring it back.
        </EmptyState>
      ) : stores.error ? (
        <Failed title="The stores could not be fetched" onRetry={() => void stores.refetch()}>
          {failureWords(stores.error)}
        </Failed>
      ) : (
        <Waiting>Looking at the shelf.</Waiting>
      )}
    </Page>
  );
}

function IngredientView({ ingredient }: { ingredient: Ingredient }) {
  const may = useMay();
  const units = useUnits();
  const navigate = useNavigate();
  const remove = useRemove('ingredients');
  const [asked, setAsked] = useState<'receive' | 'edit' | null>(null);
  const { facts, lots } = ingredient;
  const mayManage = may('stores:manage');
  const firstId = lots.length > 1 ? lots.find(({ stockG }) => stockG > 0)?.id : undefined;
  return (
    <Page
      title={facts.name}
      above={
        <span className="flex flex-wrap items-center gap-x-5">
          <Link
            to="/stores"
            className="inline-flex min-h-12 items-center underline decoration-hair decoration-2 underline-offset-4 hover:decoration-text"
          >
            Stores
          </Link>
          <span>{kindWords[facts.kind]}</span>
        </span>
      }
      lead={[factsWords(facts), facts.allergens, lowWords(facts, units.mass)].filter(Boolean).join(' · ')}
      action={
        mayManage ? (
          <div className="flex flex-wrap items-center gap-3">
            <Button look="primary" size="sheet" onClick={() => setAsked('receive')}>
              Receive a lot
            </Button>
            <Menu
              label="More"
              choices={[
                { label: 'Change what it is', onChoose: () => setAsked('edit') },
                {
                  label: 'Take it out of the stores',
                  isDanger: true,
                  onChoose: () =>
                    remove.mutate(
                      { id: ingredient.id, words: `${facts.name} taken out of the stores.` },
                      { onSuccess: () => void navigate('/stores') },
                    ),
                },
              ]}
            />
          </div>
        ) : null
      }
    >
      {remove.error ? (
        <p role="alert" className="font-medium text-ember">
          {failureWords(remove.error)}
        </p>
      ) : null}
      {lots.length > 0 ? <StockFigures ingredient={ingredient} /> : null}
      <section aria-labelledby="lots" className="grid gap-1">
        <LevelRule id="lots" aside={lots.length > 1 ? `${lots.length} lots` : null}>
          Lots
        </LevelRule>
        {lots.length === 0 ? (
          <EmptyState action={mayManage ? <Button onClick={() => setAsked('receive')}>Receive a lot</Button> : null}>
            Nothing of it has come yet. Each delivery is a lot of its own, with its number and its date, so that a keg
            can be traced to the packet.
          </EmptyState>
        ) : (
          <ul>
            {lots.map((lot) => (
              <LotSection
                key={lot.id}
                ingredient={ingredient}
                lot={lot}
                isFirst={lot.id === firstId}
                mayManage={mayManage}
              />
            ))}
          </ul>
        )}
      </section>
      {asked === 'receive' ? <ReceiveLotDialog ingredient={ingredient} onClose={() => setAsked(null)} /> : null}
      {asked === 'edit' ? <EditIngredientDialog ingredient={ingredient} onClose={() => setAsked(null)} /> : null}
    </Page>
  );
}

function StockFigures({ ingredient }: { ingredient: Ingredient }) {
  const { mass: unit } = useUnits();
  const { stockG, reservedG } = ingredient;
  const marks = marksOf(ingredient, format(new Date(), 'yyyy-MM-dd'));
  const figures = [
    { label: 'in stock', massG: stockG },
    { label: 'set aside', massG: reservedG },
    { label: 'free', massG: stockG - reservedG },
  ];
  return (
    <div className="flex flex-wrap items-end gap-x-12 gap-y-5">
      <dl className="flex flex-wrap gap-x-8 gap-y-4 sm:gap-x-12">
        {figures.map(({ label, massG }) => (
          <div key={label} className="flex flex-col-reverse">
            <dt className="text-body text-soft">{label}</dt>
            <dd className="text-title tabular-nums">{formatMass(massG, { unit })}</dd>
          </div>
        ))}
      </dl>
      <p className="flex flex-wrap gap-x-6 gap-y-1">
        {marks.map(({ word, shape, tone }) => (
          <StatusChip key={word} shape={shape} tone={tone}>
            {word}
          </StatusChip>
        ))}
      </p>
    </div>
  );
}
