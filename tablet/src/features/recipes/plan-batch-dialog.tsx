import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  batchSchema,
  createBatchSchema,
  type CreateBatch,
  type Equipment,
  type Probe,
  type Revision,
} from '@steepfall/shared/contracts';
import { format } from 'date-fns';
import { useForm } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button, ButtonLink } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { equipmentQuery, probesQuery } from '#lib/hub-queries.ts';
import { failureWords } from '#lib/words.ts';

interface PlanBatchProps {
  revision: Revision;
  recipeName: string;
  isOpen: boolean;
  onClose: () => void;
}

/** A day and the kit: nothing else is needed to put a batch on the board. */
export function PlanBatchDialog(props: PlanBatchProps) {
  const { isOpen, onClose, recipeName, revision } = props;
  const equipment = useQuery({ ...equipmentQuery, enabled: isOpen });
  const probes = useQuery({ ...probesQuery, enabled: isOpen });
  const isKnown = equipment.data !== undefined && probes.data !== undefined;
  return (
    <Dialog isOpen={isOpen} onClose={onClose} title="Plan a batch">
      <p className="text-soft">
        {recipeName}, revision {revision.number}
      </p>
      {isKnown ? (
        <PlanForm {...props} equipment={equipment.data} probes={probes.data.filter(({ isRevoked }) => !isRevoked)} />
      ) : (
        <p role="status" className="mt-6">
          {equipment.error || probes.error ? failureWords(equipment.error ?? probes.error) : 'Fetching the kit.'}
        </p>
      )}
    </Dialog>
  );
}

function PlanForm({
  revision,
  onClose,
  equipment,
  probes,
}: PlanBatchProps & { equipment: Equipment[]; probes: Probe[] }) {
  const navigate = useNavigate();
  const client = useQueryClient();
  const of = (kind: Equipment['kind']) => equipment.filter((item) => item.kind === kind);
  const kettles = of('kettle');
  const chillers = of('chiller');
  const kegs = of('keg');
  const { register, handleSubmit, formState } = useForm<CreateBatch>({
    resolver: zodResolver(createBatchSchema),
    defaultValues: {
      revisionId: revision.id,
      plannedOn: format(new Date(), 'yyyy-MM-dd'),
      kettleId: kettles[0]?.id ?? '',
      chillerId: chillers[0]?.id ?? null,
      kegId: kegs[0]?.id ?? '',
      probeId: probes[0]?.id ?? null,
    },
  });
  const plan = useMutation({
    mutationFn: (body: CreateBatch) => callHubFor(batchSchema, 'batches', { method: 'POST', body }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: ['batches'] });
      void navigate('/');
    },
  });
  if (kettles.length === 0 || kegs.length === 0) {
    return (
      <div className="mt-6 grid justify-items-start gap-5">
        <p>A batch needs a kettle and a keg. Add them to the house first.</p>
        <ButtonLink to="/house">Go to the house</ButtonLink>
      </div>
    );
  }
  const orNone = { setValueAs: (value: string | null) => value || null };
  const { errors } = formState;
  return (
    <form
      noValidate
      onSubmit={(event) => void handleSubmit((body) => plan.mutate(body))(event)}
      className="mt-6 grid gap-5"
    >
      <TextField label="Day" type="date" error={errors.plannedOn?.message} {...register('plannedOn')} />
      <SelectField label="Kettle" error={errors.kettleId?.message} {...register('kettleId')}>
        {kettles.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      <SelectField label="Chiller" error={errors.chillerId?.message} {...register('chillerId', orNone)}>
        {chillers.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
        <option value="">none</option>
      </SelectField>
      <SelectField label="Keg" error={errors.kegId?.message} {...register('kegId')}>
        {kegs.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="Probe"
        hint="Without one the sheet runs all the same; no temperature calls you then."
        error={errors.probeId?.message}
        {...register('probeId', orNone)}
      >
        {probes.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
        <option value="">none</option>
      </SelectField>
      {plan.isError ? (
        <Banner tone="act" title="The batch was not planned">
          {failureWords(plan.error)}
        </Banner>
      ) : null}
      <div className="mt-2 flex flex-wrap gap-3">
        <Button look="primary" type="submit" isBusy={plan.isPending} busyLabel="Planning">
          Plan it
        </Button>
        <Button onClick={onClose}>Close</Button>
      </div>
    </form>
  );
}
