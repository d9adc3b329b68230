import { Description, Field, Label, Radio, RadioGroup } from '@headlessui/react';
import { SelectField } from '#components/field.tsx';
import { jarWith, type Jar } from './facts-words.ts';

interface JarFieldsProps<Value extends string> {
  label: string;
  jars: readonly Jar<Value>[];
  value: Value;
  onChange: (value: Value) => void;
}

/** Which substance, and where it is sold with and without water in the crystal, which of them is in the jar. */
export function JarFields<Value extends string>({ label, jars, value, onChange }: JarFieldsProps<Value>) {
  const jar = jarWith(jars, value);
  const choose = (name: string) => {
    const first = jars.find((each) => each.name === name)?.variants[0];
    if (first) onChange(first.value);
  };
  return (
    <>
      <SelectField label={label} value={jar.name} onChange={({ target }) => choose(target.value)}>
        {jars.map(({ name }) => (
          <option key={name} value={name}>
            {name}
          </option>
        ))}
      </SelectField>
      {jar.variants.length > 1 ? (
        <Field className="grid gap-2">
          <Label className="text-body font-medium">Which one is in the jar?</Label>
          <RadioGroup value={value} onChange={onChange} className="grid gap-2">
            {jar.variants.map((variant) => (
              <Field key={variant.value}>
                <Radio
                  value={variant.value}
                  className="group flex cursor-pointer gap-4 rounded-lg border-2 border-edge px-4 py-3 data-checked:border-text"
                >
                  <span
                    aria-hidden="true"
                    className="mt-1 grid size-5 shrink-0 place-items-center rounded-full border-2 border-edge group-data-checked:border-text"
                  >
                    <span className="hidden size-2.5 rounded-full bg-text group-data-checked:block" />
                  </span>
                  <span>
                    <Label className="block cursor-pointer text-body font-medium">{variant.label}</Label>
                    <Description className="text-note text-soft">{variant.tell}</Description>
                  </span>
                </Radio>
              </Field>
            ))}
          </RadioGroup>
        </Field>
      ) : null}
    </>
  );
}
