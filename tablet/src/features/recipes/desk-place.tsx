import { createContext, use, useCallback, useEffect, useMemo, useState, type ReactNode } from 'react';
import type { Addition } from '@steepfall/shared/sheets';
import { useFormContext } from 'react-hook-form';
import type { RecipeForm } from './recipe-form.ts';

interface DeskPlace {
  /** Additions whose details are open, by id. */
  isOpen: (additionId: string) => boolean;
  toggle: (additionId: string) => void;
  /** Opens what hides the field of this path, and goes there. */
  openPath: (path: string) => void;
  /** Puts an addition back where it was, into the list as it is now. */
  restoreAddition: (addition: Addition, index: number) => void;
}

const DeskPlaceContext = createContext<DeskPlace | null>(null);

export function useDeskPlace(): DeskPlace {
  const place = use(DeskPlaceContext);
  if (!place) throw new Error('No desk around this field.');
  return place;
}

/** The field itself, or the nearest one that holds it: a warning may name "gas" where "gas.volumes" is typed. */
function fieldAt(path: string): HTMLElement | null {
  const named = [...document.querySelectorAll<HTMLElement>('[name]')];
  const nameOf = (field: HTMLElement) => field.getAttribute('name') ?? '';
  const found =
    named.find((field) => nameOf(field) === path) ?? named.find((field) => nameOf(field).startsWith(`${path}.`));
  const parent = path.replace(/\.[^.]+$/, '');
  return found ?? (parent === path ? null : fieldAt(parent));
}

export function DeskPlaceProvider({ children }: { children: ReactNode }) {
  const { getValues, setValue } = useFormContext<RecipeForm>();
  const [openIds, setOpenIds] = useState<ReadonlySet<string>>(new Set());
  const [wanted, setWanted] = useState<{ path: string } | null>(null);

  // After what hid the field has been drawn.
  useEffect(() => {
    if (!wanted) return;
    const field = fieldAt(wanted.path);
    field?.focus({ preventScroll: true });
    // What is typed next is meant in place of what stands there.
    if (field instanceof HTMLInputElement) field.select();
    field?.scrollIntoView({ block: 'center' });
  }, [wanted]);

  const toggle = useCallback((id: string) => {
    setOpenIds((open) => {
      const next = new Set(open);
      if (!next.delete(id)) next.add(id);
      return next;
    });
  }, []);

  const openPath = useCallback(
    (path: string) => {
      const index = /^additions\.(\d+)\.(?!massG)/.exec(path)?.[1];
      const id = index === undefined ? undefined : getValues('document').additions[Number(index)]?.id;
      if (id) setOpenIds((open) => new Set(open).add(id));
      setWanted({ path });
    },
    [getValues],
  );

  const restoreAddition = useCallback(
    (addition: Addition, index: number) => {
      const { additions } = getValues('document');
      if (additions.some(({ id }) => id === addition.id)) return;
      setValue('document.additions', additions.toSpliced(index, 0, addition), {
        shouldValidate: true,
        shouldDirty: true,
      });
    },
    [getValues, setValue],
  );

  const place = useMemo(
    () => ({ isOpen: (id: string) => openIds.has(id), toggle, openPath, restoreAddition }),
    [openIds, toggle, openPath, restoreAddition],
  );
  return <DeskPlaceContext value={place}>{children}</DeskPlaceContext>;
}
