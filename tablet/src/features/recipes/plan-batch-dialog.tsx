import { useMemo, type ReactNode } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  batchSchema,
  createBatchSchema,
  type Equipment,
  type Ingredient,
  type Probe,
  type Revision,
} from '@steepfall/shared/contracts';
import { costOf, proposeReservation } from '@steepfall/shared/desk';
import { format } from 'date-fns';
import { FormProvider, useForm, useWatch, type Resolver } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button, ButtonLink } from '#components/button.tsx';
import { CostLine } from '#components/cost-line.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { HubProblemError } from '#lib/http.ts';
import { equipmentQuery, probesQuery, storesQuery } from '#lib/hub-queries.ts';
import { failureWords, fieldProblems, listWords } from '#lib/words.ts';
import { ReserveFields } from './plan-reserve.tsx';
import { shelfOf, shortOf, weighedOf, type PlanDraft } from './plan-shelf.ts';

interface PlanBatchProps {
  revision: Revision;
  recipeName: string;
  isOpen: boolean;
  onClose: () => void;
  /** Make the recipe as large as the stores allow; `null` for whoever may not change it. */
  onScale: (() => void) | null;
}

/** A day, the kit, and what is set aside of the stores: then the batch is on the board. */
export function PlanBatchDialog(props: PlanBatchProps) {
  const { isOpen, onClose, recipeName, revision } = props;
  const equipment = useQuery({ ...equipmentQuery, enabled: isOpen });
  const probes = useQuery({ ...probesQuery, enabled: isOpen });
  const stores = useQuery({ ...storesQuery, enabled: isOpen });
  const failure = equipment.error ?? probes.error ?? stores.error;
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="Plan a batch" size="wide">
      <p className="text-soft">
        {recipeName}, revision {revision.number}
      </p>
      {equipment.data && probes.data && stores.data ? (
        <PlanForm
          {...props}
          equipment={equipment.data}
          probes={probes.data.filter(({ isRevoked, isSimulated }) => !isRevoked && !isSimulated)}
          stores={stores.data}
        />
      ) : (
        <p role="status" className="mt-6">
          {failure ? failureWords(failure) : 'Fetching the kit and the stores.'}
        </p>
      )}
    </Dialog>
  );
}

interface PlanFormProps extends PlanBatchProps {
  equipment: Equipment[];
  probes: Probe[];
  stores: Ingredient[];
}

function PlanForm({ revision, onClose, onScale, equipment, probes, stores }: PlanFormProps) {
  const of = (kind: Equipment['kind']) => equipment.filter((item) => item.kind === kind);
  const kettles = of('kettle');
  const chillers = of('chiller');
  const kegs = of('keg');
  const form = useForm<PlanDraft>({
    resolver: zodResolver(createBatchSchema) as unknown as Resolver<PlanDraft>,
    defaultValues: {
      revisionId: revision.id,
      plannedOn: format(new Date(), 'yyyy-MM-dd'),
      kettleId: kettles[0]?.id ?? '',
      chillerId: chillers[0]?.id ?? null,
      kegId: kegs[0]?.id ?? '',
      probeId: probes[0]?.id ?? null,
      reserve: proposeReservation(revision.document, stores).lines,
      mayGoBelowZero: false,
    },
  });
  const plan = usePlan((field, message) => form.setError(field as keyof PlanDraft, { message }));
  if (kettles.length === 0 || kegs.length === 0) {
    return (
      <div className="mt-6 grid justify-items-start gap-5">
        <p>A batch needs a kettle and a keg. Add them to the house first.</p>
        <ButtonLink to="/house">Go to the house</ButtonLink>
      </div>
    );
  }
  const { register, handleSubmit, formState, control } = form;
  const orNone = { setValueAs: (value: string | null) => value || null };
  const { errors } = formState;
  const isShort = plan.error instanceof HubProblemError && plan.error.type === 'not-enough-stock';
  const send = (mayGoBelowZero: boolean) => handleSubmit((body) => plan.mutate({ ...body, mayGoBelowZero }));
  return (
    <FormProvider {...form}>
      <form noValidate onSubmit={(event) => void send(false)(event)} className="mt-6 grid gap-8">
        <div className="grid gap-5 sm:grid-cols-2">
          <TextField label="Day" type="date" error={errors.plannedOn?.message} {...register('plannedOn')} />
          <SelectField label="Kettle" error={errors.kettleId?.message} {...register('kettleId')}>
            {namesOf(kettles)}
          </SelectField>
          <SelectField label="Chiller" error={errors.chillerId?.message} {...register('chillerId', orNone)}>
            {namesOf(chillers)}
            <option value="">none</option>
          </SelectField>
          <SelectField label="Keg" error={errors.kegId?.message} {...register('kegId')}>
            {namesOf(kegs)}
          </SelectField>
          <SelectField
            label="Probe"
            hint="Without one no temperature calls you."
            error={errors.probeId?.message}
            {...register('probeId', orNone)}
          >
            {namesOf(probes)}
            <option value="">none</option>
          </SelectField>
        </div>
        <ReserveFields document={revision.document} stores={stores} control={control} />
        <PlanFoot
          revision={revision}
          stores={stores}
          control={control}
          isBusy={plan.isPending}
          onClose={onClose}
          onScale={onScale}
          refusal={
            isShort ? (
              <Banner
                tone="act"
                title="The stores hold less than that"
                action={<Button onClick={() => void send(true)()}>Set it aside all the same</Button>}
              >
                Take less of the lots that are marked, or another lot. Or set it aside all the same: they go below zero
                when the run starts.
              </Banner>
            ) : plan.error && fieldProblems(plan.error).length === 0 ? (
              <Banner tone="act" title="The batch was not planned">
                {failureWords(plan.error)}
              </Banner>
            ) : null
          }
        />
      </form>
    </FormProvider>
  );
}

function namesOf(items: readonly { id: string; name: string }[]) {
  return items.map(({ id, name }) => (
    <option key={id} value={id}>
      {name}
    </option>
  ));
}

function usePlan(onFieldProblem: (field: string, message: string) => void) {
  const navigate = useNavigate();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: PlanDraft) => callHubFor(batchSchema, 'batches', { method: 'POST', body }),
    onSuccess: ({ id }) => {
      void client.invalidateQueries({ queryKey: ['batches'] });
      void client.invalidateQueries({ queryKey: storesQuery.queryKey });
      void navigate(`/batches/${id}`);
    },
    onError: (error) => {
      for (const { field, detail } of fieldProblems(error)) onFieldProblem(field, detail);
    },
  });
}

interface PlanFootProps {
  revision: Revision;
  stores: readonly Ingredient[];
  control: ReturnType<typeof useForm<PlanDraft>>['control'];
  isBusy: boolean;
  onClose: () => void;
  onScale: (() => void) | null;
  refusal: ReactNode;
}

/** What it costs, what is short, and the ways on. */
function PlanFoot({ revision, stores, control, isBusy, onClose, onScale, refusal }: PlanFootProps) {
  const { document } = revision;
  const reserve = useWatch({ control, name: 'reserve' });
  const shelf = useMemo(() => shelfOf(stores), [stores]);
  const short = shortOf(document.additions, reserve);
  const { servingMl } = document.assume;
  const cost = costOf(weighedOf(document.additions, reserve, shelf), {
    volumeL: document.volumeL,
    ...(servingMl === undefined ? {} : { servingMl }),
  });
  return (
    <div className="grid gap-6">
      <CostLine cost={cost} />
      {short.length > 0 ? (
        <Banner title={`Not enough set aside: ${listWords(short)}`}>
          <p>Plan it all the same and bring the rest before the day, or make the batch as large as the stores allow.</p>
        </Banner>
      ) : null}
      {refusal}
      <div className="flex flex-wrap gap-3">
        <Button look="primary" type="submit" isBusy={isBusy} busyLabel="Planning">
          {short.length > 0 ? 'Plan it all the same' : 'Plan it'}
        </Button>
        {short.length > 0 && onScale ? <Button onClick={onScale}>Scale the recipe</Button> : null}
        <Button onClick={onClose}>Close</Button>
      </div>
    </div>
  );
}
