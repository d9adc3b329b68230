import { Label, Radio, RadioGroup, Field } from '@headlessui/react';
import type { ReactNode } from 'react';
import { classNames } from './class-names.ts';

export interface Segment<Value> {
  value: Value;
  label: ReactNode;
}

interface SegmentedProps<Value> {
  label: string;
  isLabelHidden?: boolean;
  value: Value;
  onChange: (value: Value) => void;
  segments: readonly Segment<Value>[];
}

/** A few choices, all visible, one of them taken. */
export function Segmented<Value extends string | number>({
  label,
  isLabelHidden,
  value,
  onChange,
  segments,
}: SegmentedProps<Value>) {
  return (
    <Field className="grid gap-1.5">
      <Label className={isLabelHidden ? 'sr-only' : 'text-body font-medium'}>{label}</Label>
      <RadioGroup value={value} onChange={onChange} className="flex flex-wrap">
        {segments.map((segment, index) => (
          <Radio
            key={segment.value}
            value={segment.value}
            className={classNames(
              'flex min-h-12 min-w-14 cursor-pointer items-center justify-center border-2 border-edge px-4 text-body font-medium tabular-nums',
              'data-checked:border-text data-checked:bg-text data-checked:text-ground',
              index > 0 && '-ml-0.5',
              index === 0 && 'rounded-l-lg',
              index === segments.length - 1 && 'rounded-r-lg',
            )}
          >
            {segment.label}
          </Radio>
        ))}
      </RadioGroup>
    </Field>
  );
}
