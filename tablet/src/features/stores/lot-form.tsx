import { zodResolver } from '@hookform/resolvers/zod';
import { receiveLotSchema, updateLotSchema, type Ingredient, type Lot } from '@steepfall/shared/contracts';
import type { LotFacts } from '@steepfall/shared/stores';
import { format } from 'date-fns';
import { useForm, type Resolver } from 'react-hook-form';
import { ControlledNumber, ControlledQuantity } from '#components/controlled.tsx';
import { Dialog } from '#components/dialog.tsx';
import { TextField } from '#components/field.tsx';
import { SendForm } from '#components/send-form.tsx';
import { priceMass } from '#lib/money.ts';
import { useKnown } from '#lib/session.ts';
import { useUnits } from '#lib/units.ts';
import { restOf, spreadProblems, useStoresAct, useStoresChange } from './use-stores.ts';

type HopFacts = NonNullable<LotFacts['hops']>;
/** What the form holds; the contract decides what of it is right. */
interface LotDraft {
  facts: Omit<LotFacts, 'hops'> & { hops: { [Key in keyof HopFacts]: HopFacts[Key] | null } | null };
  massG?: number | null;
  version?: number;
}

const noHops = { alphaPercent: null, oilMlPer100G: null, harvestedOn: null, storageIndex: null };

/** A packet of hops that says nothing of itself has no hop facts, rather than empty ones. */
function bodyOf(draft: LotDraft): LotDraft {
  const { hops } = draft.facts;
  const isSilent = hops === null || Object.values(hops).every((value) => value === null);
  return { ...draft, facts: { ...draft.facts, hops: isSilent ? null : hops } };
}

export function ReceiveLotDialog({ ingredient, onClose }: { ingredient: Ingredient; onClose: () => void }) {
  const receive = useStoresAct((body: LotDraft) => [
    `stores/ingredients/${ingredient.id}/lots`,
    { method: 'POST', body },
  ]);
  return (
    <Dialog isOpen onClose={onClose} title={`Receive ${ingredient.facts.name}`}>
      <LotForm
        schema={receiveLotSchema}
        isHops={ingredient.facts.kind === 'hops'}
        start={{
          massG: null,
          facts: {
            code: '',
            receivedOn: format(new Date(), 'yyyy-MM-dd'),
            bestBefore: null,
            pricePerKg: null,
            note: '',
            hops: null,
          },
        }}
        act={receive}
        onSend={(body, onError) => receive.mutate(body, { onSuccess: onClose, onError })}
        onClose={onClose}
        words={{ act: 'Put it on the shelf', busyLabel: 'Writing it down', failedTitle: 'Nothing was received' }}
      />
    </Dialog>
  );
}

interface EditLotProps {
  ingredient: Ingredient;
  lot: Lot;
  onClose: () => void;
}

export function EditLotDialog({ ingredient, lot, onClose }: EditLotProps) {
  const { code, receivedOn, bestBefore, pricePerKg, note, hops, version } = lot;
  const save = useStoresChange<LotDraft>(
    `stores/lots/${lot.id}`,
    version,
    (stores) => stores.flatMap(({ lots }) => lots).find(({ id }) => id === lot.id)?.version,
  );
  return (
    <Dialog isOpen onClose={onClose} title={`Change lot ${code}`}>
      <LotForm
        schema={updateLotSchema}
        isHops={ingredient.facts.kind === 'hops'}
        start={{ version, facts: { code, receivedOn, bestBefore, pricePerKg, note, hops } }}
        act={save}
        onSend={(body, onError) => save.send(body, { onSuccess: onClose, onError })}
        onClose={onClose}
        words={{ act: 'Save', busyLabel: 'Saving', failedTitle: 'It was not saved' }}
      />
    </Dialog>
  );
}

interface LotFormProps {
  schema: typeof receiveLotSchema | typeof updateLotSchema;
  isHops: boolean;
  start: LotDraft;
  act: { isPending: boolean; error: Error | null };
  onSend: (body: LotDraft, onError: (error: Error) => void) => void;
  onClose: () => void;
  words: { act: string; busyLabel: string; failedTitle: string };
}

const orNull = { setValueAs: (value: string | null) => value || null };

function LotForm({ schema, isHops, start, act, onSend, onClose, words }: LotFormProps) {
  const units = useUnits();
  const { house } = useKnown();
  const price = priceMass[units.mass];
  const check = zodResolver(schema) as unknown as Resolver<LotDraft>;
  const { control, register, handleSubmit, setError, formState } = useForm<LotDraft>({
    resolver: (draft, context, options) => check(bodyOf(draft), context, options),
    defaultValues: { ...start, facts: { ...start.facts, hops: isHops ? (start.facts.hops ?? noHops) : null } },
  });
  const errors = formState.errors.facts;
  const send = handleSubmit((body) => onSend(body, (error) => spreadProblems(error, setError)));
  return (
    <SendForm
      onSubmit={(event) => void send(event)}
      onClose={onClose}
      isBusy={act.isPending}
      error={restOf(act.error)}
      {...words}
    >
      <TextField
        label="Lot number"
        hint="As printed on the packet. No number there? Write the day and the shop."
        autoComplete="off"
        error={errors?.code?.message}
        {...register('facts.code')}
      />
      {'massG' in start ? (
        <ControlledQuantity control={control} name="massG" kind="mass" label="How much came" />
      ) : null}
      <div className="grid gap-5 sm:grid-cols-2">
        <TextField
          label="Received on"
          type="date"
          error={errors?.receivedOn?.message}
          {...register('facts.receivedOn')}
        />
        <TextField
          label="Best before"
          type="date"
          error={errors?.bestBefore?.message}
          {...register('facts.bestBefore', orNull)}
        />
      </div>
      <ControlledNumber
        control={control}
        name="facts.pricePerKg"
        label={`Price for a ${price.word}`}
        unit={house.currency}
        factor={price.massKg}
        hint="Empty when you do not know it; the cost of a batch then says so."
      />
      {isHops ? (
        <fieldset className="grid gap-5 border-l-4 border-hair pl-5">
          <legend className="float-left mb-1 text-body font-medium">What the packet says of the hops</legend>
          <div className="clear-both grid gap-5 sm:grid-cols-2">
            <ControlledNumber control={control} name="facts.hops.alphaPercent" label="Alpha at harvest" unit="%" />
            <ControlledNumber control={control} name="facts.hops.oilMlPer100G" label="Oil in 100 g" unit="mL" />
            <TextField
              label="Harvested on"
              type="date"
              error={errors?.hops?.harvestedOn?.message}
              {...register('facts.hops.harvestedOn', orNull)}
            />
            <ControlledNumber control={control} name="facts.hops.storageIndex" label="Storage index" />
          </div>
        </fieldset>
      ) : null}
      <TextField label="Note" autoComplete="off" error={errors?.note?.message} {...register('facts.note')} />
    </SendForm>
  );
}
