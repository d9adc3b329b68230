import { zodResolver } from '@hookform/resolvers/zod';
import { moveLotSchema, type Lot, type MoveLot } from '@steepfall/shared/contracts';
import { formatMass } from '@steepfall/shared/units';
import { useForm, useWatch, type Resolver } from 'react-hook-form';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { ControlledQuantity } from '#components/controlled.tsx';
import { Dialog } from '#components/dialog.tsx';
import { TextField } from '#components/field.tsx';
import { SendForm } from '#components/send-form.tsx';
import { useUnits } from '#lib/units.ts';
import { isProblem, restOf, spreadProblems, useStoresAct } from './use-stores.ts';

interface MoveProps {
  lot: Lot;
  onClose: () => void;
}

const useMove = (lot: Lot) =>
  useStoresAct((body: MoveLot) => [`stores/lots/${lot.id}/moves`, { method: 'POST', body }]);

interface CountDraft {
  kind: 'counted';
  toG: number | null;
  reason: string;
}

/** The packet on the scale: what it shows is what the book holds from now on. */
export function CountLotDialog({ lot, onClose }: MoveProps) {
  const { mass: unit } = useUnits();
  const move = useMove(lot);
  const { control, register, handleSubmit, setError, formState } = useForm<CountDraft>({
    resolver: zodResolver(moveLotSchema) as unknown as Resolver<CountDraft>,
    defaultValues: { kind: 'counted', toG: null, reason: '' },
  });
  const toG = useWatch({ control, name: 'toG' });
  const send = handleSubmit((body) =>
    move.mutate(body as MoveLot, { onSuccess: onClose, onError: (error) => spreadProblems(error, setError) }),
  );
  return (
    <Dialog isOpen onClose={onClose} title={`Count lot ${lot.code}`}>
      <SendForm
        onSubmit={(event) => void send(event)}
        onClose={onClose}
        act="Write it down"
        busyLabel="Writing it down"
        isBusy={move.isPending}
        failedTitle="It was not written down"
        error={restOf(move.error)}
      >
        <p>Weigh what is in the packet, without the packet. The book says {formatMass(lot.stockG, { unit })}.</p>
        <ControlledQuantity control={control} name="toG" kind="mass" label="Weighed" />
        {toG !== null && Number.isFinite(toG) ? (
          <p role="status" className="text-soft">
            {differenceWords(toG - lot.stockG, unit)}
          </p>
        ) : null}
        <TextField
          label="Why it differs"
          hint="If you know: spilled, given away, the sieve."
          autoComplete="off"
          error={formState.errors.reason?.message}
          {...register('reason')}
        />
      </SendForm>
    </Dialog>
  );
}

function differenceWords(differenceG: number, unit: 'g' | 'oz'): string {
  if (Math.abs(differenceG) < 0.0005) return 'As the book has it.';
  return `${formatMass(Math.abs(differenceG), { unit })} ${differenceG > 0 ? 'more' : 'less'} than the book has.`;
}

interface UseDraft {
  kind: 'used';
  massG: number | null;
  reason: string;
  mayGoBelowZero: boolean;
}

/** Some is taken out by hand. Below zero only when the person says so once more. */
export function UseLotDialog({ lot, onClose }: MoveProps) {
  const { mass: unit } = useUnits();
  const move = useMove(lot);
  const { control, register, handleSubmit, setError, formState } = useForm<UseDraft>({
    resolver: zodResolver(moveLotSchema) as unknown as Resolver<UseDraft>,
    defaultValues: { kind: 'used', massG: null, reason: '', mayGoBelowZero: false },
  });
  const send = (mayGoBelowZero: boolean) =>
    handleSubmit((body) =>
      move.mutate({ ...body, mayGoBelowZero } as MoveLot, {
        onSuccess: onClose,
        onError: (error) => {
          if (!isProblem(error, 'not-enough-stock')) spreadProblems(error, setError);
        },
      }),
    );
  const isShort = isProblem(move.error, 'not-enough-stock');
  return (
    <Dialog isOpen onClose={onClose} title={`Use some of lot ${lot.code}`}>
      <SendForm
        onSubmit={(event) => void send(false)(event)}
        onClose={onClose}
        act="Take it out"
        busyLabel="Taking it out"
        isBusy={move.isPending}
        failedTitle="Nothing was taken out"
        error={isShort ? null : restOf(move.error)}
      >
        <p>
          In the book: {formatMass(lot.stockG, { unit })}
          {lot.reservedG > 0 ? `, of which ${formatMass(lot.reservedG, { unit })} are set aside for batches` : ''}.
        </p>
        <ControlledQuantity control={control} name="massG" kind="mass" label="How much" />
        <TextField
          label="What for"
          autoComplete="off"
          error={formState.errors.reason?.message}
          {...register('reason')}
        />
        {isShort ? (
          <Banner
            tone="act"
            title="The stores hold less than that"
            action={<Button onClick={() => void send(true)()}>Take it all the same</Button>}
          >
            It holds {formatMass(lot.stockG, { unit })}. Take less, or take it all the same: the lot then stands below
            zero until somebody counts it.
          </Banner>
        ) : null}
      </SendForm>
    </Dialog>
  );
}
