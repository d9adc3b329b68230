import type { RecipeDocument } from '@steepfall/shared/sheets';
import { useController, useFormContext, useWatch } from 'react-hook-form';
import { messageAt, type RecipeForm } from './recipe-form.ts';

interface Part<Value> {
  value: Value;
  change: (value: Value) => void;
  /** The message at a place under this part; without a path, at the part itself. */
  errorAt: (path?: string) => string | undefined;
}

/** One member of the document: only what shows it is drawn again when it changes. */
export function usePart<Key extends keyof RecipeDocument>(key: Key): Part<RecipeDocument[Key]> {
  const { control, setValue } = useFormContext<RecipeForm>();
  // The paths of a union that deep are too much for the compiler; the member's own type is put back here.
  const name = `document.${key}` as 'document.volumeL';
  const { field, fieldState } = useController({ control, name });
  return {
    value: field.value as RecipeDocument[Key],
    // Not the field's own onChange: it compares the value with itself, and drops the message of an object that holds NaN.
    change: (value) => setValue(name, value as number, { shouldDirty: true, shouldValidate: true }),
    errorAt: (path = '') => messageAt(fieldState.error, path),
  };
}

/** Read only: what another part needs to know of this one. */
export function useValueOf<Key extends keyof RecipeDocument>(key: Key): RecipeDocument[Key] {
  const { control } = useFormContext<RecipeForm>();
  return useWatch({ control, name: `document.${key}` as 'document.volumeL' }) as RecipeDocument[Key];
}
