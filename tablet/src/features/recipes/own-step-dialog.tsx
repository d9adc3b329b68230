import { zodResolver } from '@hookform/resolvers/zod';
import { ownStepSchema, type MeasuredQuantity, type OwnStep, type Step } from '@steepfall/shared/sheets';
import { Controller, useForm } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { newId } from '#lib/ids.ts';
import { minutesScale, NumberField } from './number-field.tsx';
import { messageAt } from './recipe-form.ts';

interface OwnStepDialogProps {
  /** Null: a new one. */
  step: OwnStep | null;
  sheet: readonly Step[];
  onKeep: (step: OwnStep) => void;
  onClose: () => void;
}

const askWords: Record<MeasuredQuantity, string> = {
  pH: 'pH',
  tempC: 'temperature',
  volumeL: 'volume',
  massG: 'mass',
  pressureKPa: 'pressure',
  tasteScore: 'a mark for the taste',
};
const USUAL_WAIT_S = 300;

/** A step that no recipe could know of: rinse the hoses, call the dog in, weigh the wet leaf. */
export function OwnStepDialog({ step, sheet, onKeep, onClose }: OwnStepDialogProps) {
  const { control, register, handleSubmit, formState } = useForm<OwnStep>({
    resolver: zodResolver(ownStepSchema),
    defaultValues: step ?? { id: newId(), title: '', done: { by: 'hand' }, afterStepId: sheet[0]?.id },
  });
  const { errors } = formState;
  const orNone = { setValueAs: (value: string | undefined) => (value === '' ? undefined : value) };
  return (
    <Dialog isOpen onClose={onClose} title={step ? 'Change the step' : 'A step of your own'}>
      <form noValidate className="grid gap-5" onSubmit={(event) => void handleSubmit(onKeep)(event)}>
        <TextField
          label="What to do"
          placeholder="Rinse the hoses"
          autoComplete="off"
          error={errors.title?.message}
          {...register('title')}
        />
        <TextField
          label="What to know while doing it"
          autoComplete="off"
          error={errors.detail?.message}
          {...register('detail', orNone)}
        />
        <SelectField label="Comes after" {...register('afterStepId', orNone)}>
          <option value="">nothing: it is the first</option>
          {sheet
            .filter(({ id }) => id !== step?.id)
            .map(({ id, title }) => (
              <option key={id} value={id}>
                {title}
              </option>
            ))}
        </SelectField>
        <Controller
          control={control}
          name="done"
          render={({ field, fieldState }) => (
            <div className="grid grid-cols-2 items-end gap-3">
              <SelectField
                label="Is done"
                value={field.value.by}
                onChange={({ target }) =>
                  field.onChange(target.value === 'timer' ? { by: 'timer', durationS: USUAL_WAIT_S } : { by: 'hand' })
                }
              >
                <option value="hand">by hand</option>
                <option value="timer">by the clock, after</option>
              </SelectField>
              {field.value.by === 'timer' ? (
                <NumberField
                  label="so long"
                  path="done.durationS"
                  scale={minutesScale}
                  value={field.value.durationS}
                  error={messageAt(fieldState.error, 'durationS')}
                  onChange={(durationS = Number.NaN) => field.onChange({ by: 'timer', durationS })}
                />
              ) : null}
            </div>
          )}
        />
        <SelectField label="Asks for a number" {...register('asks', orNone)}>
          <option value="">no</option>
          {Object.entries(askWords).map(([quantity, words]) => (
            <option key={quantity} value={quantity}>
              {words}
            </option>
          ))}
        </SelectField>
        <div className="flex flex-wrap gap-3">
          <Button look="primary" type="submit">
            {step ? 'Change it' : 'Add it'}
          </Button>
          <Button onClick={onClose}>Close</Button>
        </div>
      </form>
    </Dialog>
  );
}
