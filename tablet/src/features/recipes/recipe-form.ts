import { zodResolver } from '@hookform/resolvers/zod';
import { createRecipeSchema } from '@steepfall/shared/contracts';
import type { Addition, IngredientKind, RecipeDocument, WaterPart } from '@steepfall/shared/sheets';
import type { FieldErrors, Resolver } from 'react-hook-form';
import type { z } from 'zod';
import { newId } from '#lib/ids.ts';

/** What the desk edits; the note is asked for when it is saved. */
const recipeFormSchema = createRecipeSchema.omit({ note: true });
export type RecipeForm = z.infer<typeof recipeFormSchema>;

const resolveForm = zodResolver(recipeFormSchema);

/**
 * The form's resolver. The form takes an error tree without a type of its own for no error at all, and so would drop what is wrong inside a
 * member that is edited as one thing, such as the gas: each such member gets a type.
 */
export const recipeResolver: Resolver<RecipeForm> = async (...args) => {
  const result = await resolveForm(...args);
  for (const part of Object.values(result.errors.document ?? {}))
    if (typeof part === 'object' && part !== null && !Array.isArray(part))
      Object.assign(part, { type: 'part', ...part });
  return result;
};

/** A first amount for each litre of water, so that a new line moves the figures at once; the brewer writes over it. */
const firstGPerL: Record<IngredientKind, number> = { salt: 0.1, acid: 0.2, tea: 4, hops: 2, other: 1 };

export function newAddition(kind: IngredientKind, waterL: number): Addition {
  const litres = Number.isFinite(waterL) && waterL > 0 ? waterL : 20;
  const massG = Math.max(0.5, Math.round(firstGPerL[kind] * litres * 2) / 2);
  const common = { id: newId(), massG, keeps: 'g-per-l' } as const;
  switch (kind) {
    case 'salt':
      return { ...common, kind, name: 'calcium chloride', salt: 'calciumChlorideDihydrate', in: { at: 'fill' } };
    case 'acid':
      return { ...common, kind, name: 'citric acid', acid: 'citricAnhydrous', in: { at: 'fill' } };
    case 'tea':
      return {
        ...common,
        kind,
        name: 'green tea',
        tea: 'green',
        form: 'whole',
        in: { at: 'steep', afterS: 0 },
        out: { at: 'timer', durationS: 180 },
      };
    case 'hops':
      return {
        ...common,
        kind,
        name: 'hops',
        form: 'pellets',
        alphaPercent: 6,
        in: { at: 'falling', tempC: 62 },
        out: { at: 'falling', tempC: 30 },
      };
    case 'other':
      return {
        ...common,
        kind,
        name: 'lemon peel',
        in: { at: 'falling', tempC: 62 },
        out: { at: 'falling', tempC: 30 },
      };
  }
}

export function newWater(percent: number, name = 'Tap water'): WaterPart {
  return {
    id: newId(),
    name,
    percent,
    report: {
      caMgPerL: 0,
      mgMgPerL: 0,
      naMgPerL: 0,
      kMgPerL: 0,
      clMgPerL: 0,
      so4MgPerL: 0,
      alkalinity: { as: 'hco3', mgPerL: 0 },
    },
  };
}

/** Twenty litres of pure water on a day that works: everything else is the brewer's. */
export function blankForm(): RecipeForm {
  const document: RecipeDocument = {
    v: 2,
    volumeL: 20,
    waterL: 22,
    waters: [newWater(100, 'Reverse-osmosis water')],
    additions: [],
    steepC: 76,
    transferC: 20,
    gas: { volumes: 2.8, tempC: 4 },
    targets: { waterPh: { min: 3.1, max: 4.4 } },
    steps: { own: [] },
    assume: {},
  };
  return { name: '', summary: '', document };
}

/** What JSON would keep: members that are undefined do not count as a difference. */
export function isSameJson(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const [one, other] = [a as Record<string, unknown>, b as Record<string, unknown>];
  return [...new Set([...Object.keys(one), ...Object.keys(other)])].every((key) => isSameJson(one[key], other[key]));
}

/** The message at a place of an error tree as the form keeps it; the tree has lists where the document has them. */
export function messageAt(errors: unknown, path: string): string | undefined {
  let found = errors;
  for (const key of path === '' ? [] : path.split('.')) found = (found as Record<string, unknown> | undefined)?.[key];
  const message = (found as { message?: unknown } | undefined)?.message;
  return typeof message === 'string' ? message : undefined;
}

/** Paths of everything that is wrong, in the order of the form. */
export function wrongPaths(errors: FieldErrors<RecipeForm>): string[] {
  const paths: string[] = [];
  const walk = (node: unknown, path: string) => {
    if (typeof node !== 'object' || node === null) return;
    if (typeof (node as { message?: unknown }).message === 'string') {
      paths.push(path);
      return;
    }
    for (const [key, child] of Object.entries(node)) {
      if (key !== 'ref') walk(child, path === '' ? key : `${path}.${key}`);
    }
  };
  walk(errors, '');
  return paths.map((path) => path.replace(/^document\./, ''));
}
