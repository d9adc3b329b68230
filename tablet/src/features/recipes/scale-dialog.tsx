import { useMemo, useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { Equipment, Ingredient } from '@steepfall/shared/contracts';
import {
  revisionDifferences,
  scaleToKettle,
  scaleToVolume,
  storesFit,
  type StoresFit,
  type Swap,
} from '@steepfall/shared/desk';
import { recipeDocumentSchema, type RecipeDocument } from '@steepfall/shared/sheets';
import { formatMass, formatVolume } from '@steepfall/shared/units';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField } from '#components/field.tsx';
import { Segmented } from '#components/segmented.tsx';
import { storesQuery } from '#lib/hub-queries.ts';
import { inPersonsWords, quantityOf, useUnits } from '#lib/units.ts';
import { failureWords } from '#lib/words.ts';
import { DifferenceList } from './difference-list.tsx';
import { NumberField } from './number-field.tsx';
import { withSwap } from './take-swap.ts';

type Kettle = Extract<Equipment, { kind: 'kettle' }>;
export type ScaleWay = 'volume' | 'kettle' | 'stores';

const ways: { value: ScaleWay; label: string }[] = [
  { value: 'volume', label: 'a volume' },
  { value: 'kettle', label: 'a kettle' },
  { value: 'stores', label: 'the stores' },
];

interface ScaleDialogProps {
  document: RecipeDocument;
  kettles: readonly Kettle[];
  /** What it is asked for first. */
  firstWay?: ScaleWay;
  /** Finest step of the scale, g. */
  resolutionG: number | undefined;
  /** The scaled recipe, to be looked at and saved like any other change. */
  onTake: (document: RecipeDocument) => void;
  onClose: () => void;
}

type Scaled = { document: RecipeDocument; words: string } | { problem: string };

function tried(work: () => { document: RecipeDocument; words: string }): Scaled {
  try {
    const scaled = work();
    const parsed = recipeDocumentSchema.safeParse(scaled.document);
    return parsed.success ? scaled : { problem: parsed.error.issues[0]?.message ?? 'This cannot be scaled so far.' };
  } catch (error) {
    if (error instanceof RangeError) return { problem: error.message };
    throw error;
  }
}

/** More or less of the same drink. What it would become is shown before it is taken. */
export function ScaleDialog({
  document: given,
  kettles,
  firstWay = 'volume',
  resolutionG,
  onTake,
  onClose,
}: ScaleDialogProps) {
  const units = useUnits();
  const stores = useQuery(storesQuery);
  const [document, setDocument] = useState(given);
  const [way, setWay] = useState<ScaleWay>(firstWay);
  const [volumeL, setVolumeL] = useState(given.volumeL);
  const [kettleId, setKettleId] = useState(kettles[0]?.id ?? '');
  const options = useMemo(() => (resolutionG === undefined ? {} : { resolutionG }), [resolutionG]);
  const kettle = kettles.find(({ id }) => id === kettleId);
  const fit = useMemo(
    () => (way === 'stores' && stores.data ? storesFit(document, stores.data, options) : null),
    [way, stores.data, document, options],
  );
  const litres = (value: number) => formatVolume(value, { unit: units.volume });

  const scaled = useMemo((): Scaled | null => {
    switch (way) {
      case 'volume':
        return tried(() => ({ document: scaleToVolume(document, volumeL, options), words: '' }));
      case 'kettle':
        if (!kettle) return { problem: 'Add a kettle to the house first.' };
        return tried(() => {
          const { document: next, kind } = scaleToKettle(document, kettle.facts, options);
          const words = {
            fits: `It fills ${kettle.name} as it is.`,
            shrunk: `It is too much for ${kettle.name}: hot, with its leaf, it would rise too high.`,
            grown: `${kettle.name} has room for more.`,
          };
          return { document: next, words: words[kind] };
        });
      case 'stores':
        if (!fit) return null;
        if (fit.volumeL <= 0)
          return { problem: 'Something of it is not in the stores at all: swap it, or buy it first.' };
        return tried(() => ({ document: scaleToVolume(document, fit.volumeL, options), words: '' }));
    }
  }, [way, volumeL, kettle, fit, document, options]);

  const differences = scaled && 'document' in scaled ? revisionDifferences(given, scaled.document, units) : [];
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Scale to"
      size="wide"
      actions={
        <>
          <Button
            look="primary"
            disabled={differences.length === 0}
            onClick={() => scaled && 'document' in scaled && onTake(scaled.document)}
          >
            Take it to the desk
          </Button>
          <Button onClick={onClose}>Close</Button>
        </>
      }
    >
      <div className="grid gap-6">
        <Segmented label="How" isLabelHidden value={way} onChange={setWay} segments={ways} />
        {way === 'volume' ? (
          <div className="max-w-xs">
            <NumberField
              label="Drink wanted in the keg"
              path="scale.volumeL"
              scale={quantityOf('volume', units)}
              value={volumeL}
              onChange={(value = Number.NaN) => setVolumeL(value)}
              error={scaled && 'problem' in scaled ? scaled.problem : undefined}
            />
          </div>
        ) : null}
        {way === 'kettle' && kettles.length > 0 ? (
          <div className="max-w-xs">
            <SelectField label="Kettle" value={kettleId} onChange={({ target }) => setKettleId(target.value)}>
              {kettles.map(({ id, name }) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
            </SelectField>
          </div>
        ) : null}
        {way === 'stores' ? (
          stores.data && fit ? (
            <StoresAnswer
              fit={fit}
              onSwap={(swap) => {
                const ingredient = stores.data.find(({ id }) => id === swap.ingredientId);
                if (ingredient) setDocument(swapped(document, swap, ingredient));
              }}
            />
          ) : (
            <p role="status">{stores.error ? failureWords(stores.error) : 'Looking into the stores.'}</p>
          )
        ) : null}
        {scaled && 'problem' in scaled && way !== 'volume' ? (
          <p role="alert" className="font-medium text-ember">
            {inPersonsWords(scaled.problem, units)}
          </p>
        ) : null}
        {scaled && 'document' in scaled ? (
          <section aria-label="What it becomes" className="grid gap-3">
            <p className="text-lead font-semibold">
              {scaled.words ? `${scaled.words} ` : ''}
              {differences.length > 0
                ? `${litres(scaled.document.volumeL)} of drink from ${litres(scaled.document.waterL)} of water`
                : 'Nothing changes.'}
            </p>
            <DifferenceList differences={differences} />
            {resolutionG === undefined ? null : (
              <p className="text-note text-soft">
                Rounded to what the scale of the house shows: {formatMass(resolutionG, { unit: units.mass })}.
              </p>
            )}
          </section>
        ) : null}
      </div>
    </Dialog>
  );
}

function swapped(document: RecipeDocument, swap: Swap, ingredient: Ingredient): RecipeDocument {
  return withSwap(document, swap, ingredient, Date.now());
}

const byWords: Record<Swap['by'], string> = {
  alpha: 'the same alpha acids',
  substance: 'the same in the water',
  mass: 'gram for gram',
};

/** They come the most alike first; a full shelf would make a list that nobody reads. */
const MOST_SWAPS = 5;

/** "34 g of this tea left: brew 12.4 L, or swap part of it for …". */
function StoresAnswer({ fit, onSwap }: { fit: StoresFit; onSwap: (swap: Swap) => void }) {
  const units = useUnits();
  const mass = (massG: number) => formatMass(massG, { unit: units.mass });
  const volume = (volumeL: number) => formatVolume(volumeL, { unit: units.volume });
  return (
    <div className="grid gap-4">
      {fit.limitedBy ? (
        <p className="text-lead">
          {fit.limitedBy.freeG > 0
            ? `${mass(fit.limitedBy.freeG)} of ${fit.limitedBy.name} left`
            : `No ${fit.limitedBy.name} left`}
          {fit.volumeL > 0 ? `: enough for ${volume(fit.volumeL)}` : ''}
          {fit.swaps.length > 0 ? ', or swap part of it.' : '.'}
        </p>
      ) : (
        <p className="text-lead">
          {fit.notInStores.length > 0 ? 'What the stores know of it is' : 'The stores have'} enough for{' '}
          {volume(fit.wantedL)}.
        </p>
      )}
      {fit.swaps.length > 0 ? (
        <ul className="grid">
          {fit.swaps.slice(0, MOST_SWAPS).map((swap) => (
            <li
              key={`${swap.additionId}${swap.ingredientId}`}
              className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-b border-hair py-2.5"
            >
              <p className="min-w-52 flex-1">
                {swap.keepG > 0 ? `${mass(swap.keepG)} ${swap.name} and ` : `In place of ${swap.name}: `}
                <span className="font-medium">
                  {mass(swap.takeG)} {swap.ingredientName}
                </span>
                <span className="block text-note text-soft">
                  {byWords[swap.by]}
                  {swap.isAlike ? '' : ', another kind'}
                  {swap.isEnough ? '' : ', not all of it is there'}
                </span>
              </p>
              <Button onClick={() => onSwap(swap)}>
                Swap<span className="sr-only"> for {swap.ingredientName}</span>
              </Button>
            </li>
          ))}
        </ul>
      ) : null}
      {fit.swaps.length > MOST_SWAPS ? (
        <p className="text-note text-soft">
          The {MOST_SWAPS} most alike of {fit.swaps.length} that could stand in.
        </p>
      ) : null}
      {fit.notInStores.length > 0 ? (
        <p className="text-note text-soft">
          Not in the stores, and not counted: {fit.notInStores.map(({ name }) => name).join(', ')}.
        </p>
      ) : null}
    </div>
  );
}
