import { zodResolver } from '@hookform/resolvers/zod';
import { stepSchema, type Step } from '@steepfall/shared/sheets';
import { Controller, useFieldArray, useForm, useWatch, type Control, type Resolver } from 'react-hook-form';
import { Button } from '#components/button.tsx';
import { ControlledNumber, ControlledQuantity } from '#components/controlled.tsx';
import { Dialog } from '#components/dialog.tsx';
import { SelectField, TextField } from '#components/field.tsx';
import { plainWords } from './step-form-words.ts';

interface SheetEditorStepProps {
  step: Step;
  isNew: boolean;
  onSave: (step: Step) => void;
  onClose: () => void;
}

/** One step of the sheet: its words, its amounts, and when it begins and ends. */
export function SheetEditorStep({ step, isNew, onSave, onClose }: SheetEditorStepProps) {
  const { control, register, handleSubmit, formState } = useForm<Step>({
    resolver: zodResolver(stepSchema, { error: plainWords }) as unknown as Resolver<Step>,
    defaultValues: step,
  });
  const { errors } = formState;
  return (
    <Dialog isOpen onClose={onClose} title={isNew ? 'Add a step' : `Change “${step.title}”`} size="wide">
      <form noValidate className="grid gap-5" onSubmit={(event) => void handleSubmit(onSave)(event)}>
        <TextField
          label="What to do"
          hint="Verb first, few words."
          autoComplete="off"
          error={errors.title?.message}
          {...register('title')}
        />
        <TextField
          label="What to know"
          hint="A sentence or two, for a tired person."
          autoComplete="off"
          error={errors.detail?.message}
          {...register('detail', { setValueAs: (value: string | undefined) => value || undefined })}
        />
        <Amounts control={control} />
        <div className="grid items-start gap-5 sm:grid-cols-2">
          <StartFields control={control} />
          <DoneFields control={control} />
        </div>
        <div className="mt-2 flex flex-wrap gap-3">
          <Button look="primary" type="submit">
            {isNew ? 'Add it' : 'Change it'}
          </Button>
          <Button onClick={onClose}>Close</Button>
        </div>
      </form>
    </Dialog>
  );
}

function Amounts({ control }: { control: Control<Step> }) {
  const { fields, append, remove } = useFieldArray({ control, name: 'amounts' });
  return (
    <fieldset className="grid gap-4">
      <legend className="mb-1 text-body font-medium">What goes in</legend>
      {fields.map(({ id }, index) => (
        <div key={id} className="grid items-start gap-4 sm:grid-cols-[1fr_9rem_8rem_auto]">
          <Controller
            control={control}
            name={`amounts.${index}.name`}
            render={({ field, fieldState }) => (
              <TextField label={<Small>Name</Small>} autoComplete="off" error={fieldState.error?.message} {...field} />
            )}
          />
          <ControlledQuantity
            control={control}
            name={`amounts.${index}.massG`}
            kind="mass"
            label={<Small>Amount</Small>}
          />
          <Controller
            control={control}
            name={`amounts.${index}.bag`}
            render={({ field: { value, onChange, ...field }, fieldState }) => (
              <TextField
                label={<Small>Bag</Small>}
                autoComplete="off"
                error={fieldState.error?.message}
                value={value ?? ''}
                onChange={({ target }) => onChange(target.value || undefined)}
                {...field}
              />
            )}
          />
          <Button look="quiet" className="-mx-5 sm:mt-7" onClick={() => remove(index)}>
            Leave out<span className="sr-only"> amount {index + 1}</span>
          </Button>
        </div>
      ))}
      <div>
        <Button
          look="quiet"
          className="-ml-5"
          // The empty mass is refused with words; a made-up one would be weighed.
          onClick={() => append({ name: '', massG: Number.NaN })}
        >
          Add an amount
        </Button>
      </div>
    </fieldset>
  );
}

const Small = ({ children }: { children: string }) => <span className="text-note text-soft">{children}</span>;

function StartFields({ control }: { control: Control<Step> }) {
  const start = useWatch({ control, name: 'start' });
  return (
    <div className="grid gap-4">
      <Controller
        control={control}
        name="start"
        render={({ field: { value, onChange, ...field } }) => (
          <SelectField
            label="It begins"
            {...field}
            value={value.by === 'hand' ? 'hand' : value.direction}
            onChange={({ target }) => onChange(startOf(target.value, value))}
          >
            <option value="hand">when somebody gets to it</option>
            <option value="rising">when the liquid has risen to</option>
            <option value="falling">when the liquid has fallen to</option>
          </SelectField>
        )}
      />
      {start.by === 'temperature' ? (
        <ControlledQuantity control={control} name="start.tempC" kind="temperature" label="At" />
      ) : null}
    </div>
  );
}

function startOf(choice: string, now: Step['start']): Step['start'] {
  if (choice === 'hand') return { by: 'hand' };
  const direction = choice === 'rising' ? 'rising' : 'falling';
  return { by: 'temperature', direction, tempC: now.by === 'temperature' ? now.tempC : Number.NaN };
}

type DoneChoice = 'hand' | 'timer' | 'rising' | 'falling' | 'measurement';

function DoneFields({ control }: { control: Control<Step> }) {
  const done = useWatch({ control, name: 'done' });
  return (
    <div className="grid gap-4">
      <Controller
        control={control}
        name="done"
        render={({ field: { value, onChange, ...field } }) => (
          <SelectField
            label="It is done"
            {...field}
            value={doneChoiceOf(value)}
            onChange={({ target }) => onChange(doneOf(target.value as DoneChoice, value))}
          >
            <option value="hand">when somebody says so</option>
            <option value="timer">after a time</option>
            <option value="rising">when the liquid has risen to</option>
            <option value="falling">when the liquid has fallen to</option>
            {value.by === 'measurement' ? <option value="measurement">when it is measured</option> : null}
          </SelectField>
        )}
      />
      {done.by === 'timer' ? (
        <ControlledNumber control={control} name="done.durationS" label="For" unit="min" factor={1 / 60} />
      ) : null}
      {done.by === 'temperature' ? (
        <ControlledQuantity control={control} name="done.tempC" kind="temperature" label="At" />
      ) : null}
    </div>
  );
}

function doneChoiceOf(done: Step['done']): DoneChoice {
  return done.by === 'temperature' ? done.direction : done.by;
}

function doneOf(choice: DoneChoice, now: Step['done']): Step['done'] {
  switch (choice) {
    case 'hand':
      return { by: 'hand' };
    case 'timer':
      return { by: 'timer', durationS: now.by === 'timer' ? now.durationS : Number.NaN };
    case 'measurement':
      return now;
    case 'rising':
    case 'falling':
      return { by: 'temperature', direction: choice, tempC: now.by === 'temperature' ? now.tempC : Number.NaN };
  }
}
