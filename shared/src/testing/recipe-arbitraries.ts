import fc from 'fast-check';
import {
  acidSchema,
  cautionSchema,
  hopFormSchema,
  leafFormSchema,
  measuredQuantitySchema,
  recipeDocumentSchema,
  saltSchema,
  teaKindSchema,
  type Addition,
  type OwnStep,
  type RecipeDocument,
  type WaterPart,
} from '../sheets/index.js';

/** A number of a range; never -0, which JSON does not keep. */
const real = (min: number, max: number) => fc.double({ min, max, noNaN: true }).map((value) => value + 0);
/** As people type: whole and half numbers, and now and then anything. */
const typed = (min: number, max: number) =>
  fc.oneof(
    { weight: 3, arbitrary: fc.integer({ min: Math.ceil(min * 2), max: Math.floor(max * 2) }).map((n) => n / 2) },
    { weight: 1, arbitrary: real(min, max) },
  );
const above0 = (most: number) => fc.oneof(fc.integer({ min: 1, max: most }), real(0.001, most));
const words = (maxLength: number) =>
  fc.string({ minLength: 1, maxLength }).filter((text) => text.trim().length > 0 && text.trim() === text);
const id = fc.constantFrom('a', 'b', 'c', 'd', 'e', 'f');
const name = fc.constantFrom('Cascade', 'Saaz', 'sencha', 'chamomile', 'calcium chloride');
const optional = <T extends object>(shape: { [Key in keyof T]: fc.Arbitrary<T[Key]> }) =>
  fc.record<T, never>(shape, { requiredKeys: [] });

const inCondition = fc.oneof(
  fc.record({ at: fc.constant('fill' as const) }),
  fc.record({ at: fc.constant('steep' as const), afterS: typed(0, 1200) }),
  fc.record({ at: fc.constant('falling' as const), tempC: typed(0, 100) }),
  fc.record({ at: fc.constant('transfer' as const) }),
);
const outCondition = fc.oneof(
  fc.record({ at: fc.constant('timer' as const), durationS: above0(3600) }),
  fc.record({ at: fc.constant('falling' as const), tempC: typed(0, 100) }),
  fc.record({ at: fc.constant('transfer' as const) }),
);
const common = {
  id,
  name,
  massG: above0(500),
  keeps: fc.constantFrom('mass' as const, 'g-per-l' as const),
  in: inCondition,
};
const maybe = optional<{ bag: string; ingredientId: string }>({ bag: words(8), ingredientId: fc.uuid() });

const addition: fc.Arbitrary<Addition> = fc.oneof(
  fc
    .tuple(
      fc.record({ ...common, kind: fc.constant('salt' as const), salt: fc.constantFrom(...saltSchema.options) }),
      maybe,
      optional<{ assayPercent: number }>({ assayPercent: typed(1, 100) }),
    )
    .map(([one, more, facts]) => ({ ...one, ...more, ...facts })),
  fc
    .tuple(
      fc.record({ ...common, kind: fc.constant('acid' as const), acid: fc.constantFrom(...acidSchema.options) }),
      maybe,
      optional<{ strengthPercent: number }>({ strengthPercent: typed(1, 100) }),
    )
    .map(([one, more, facts]) => ({ ...one, ...more, ...facts })),
  fc
    .tuple(
      fc.record({
        ...common,
        kind: fc.constant('tea' as const),
        tea: fc.constantFrom(...teaKindSchema.options),
        form: fc.constantFrom(...leafFormSchema.options),
        out: outCondition,
      }),
      maybe,
      optional<{ caffeineMgPerG: number }>({ caffeineMgPerG: typed(0, 100) }),
    )
    .map(([one, more, facts]) => ({ ...one, ...more, ...facts })),
  fc
    .tuple(
      fc.record({
        ...common,
        kind: fc.constant('hops' as const),
        form: fc.constantFrom(...hopFormSchema.options),
        alphaPercent: typed(0, 30),
        out: outCondition,
      }),
      maybe,
      optional<{ storageIndex: number }>({ storageIndex: real(0.2, 2.5) }),
    )
    .map(([one, more, facts]) => ({ ...one, ...more, ...facts })),
  fc
    .tuple(fc.record({ ...common, kind: fc.constant('other' as const), out: outCondition }), maybe)
    .map(([one, more]) => ({ ...one, ...more })),
);

const mgPerL = typed(0, 400);
const report = fc
  .tuple(
    fc.record({
      caMgPerL: mgPerL,
      mgMgPerL: mgPerL,
      naMgPerL: mgPerL,
      clMgPerL: mgPerL,
      so4MgPerL: mgPerL,
      alkalinity: fc.record({ as: fc.constantFrom('hco3' as const, 'caco3' as const), mgPerL }),
    }),
    optional<{ kMgPerL: number }>({ kMgPerL: mgPerL }),
  )
  .map(([all, more]) => ({ ...all, ...more }));

/** Shares that make 100 % together. */
const waters: fc.Arbitrary<WaterPart[]> = fc
  .uniqueArray(fc.record({ id, name, report, weight: fc.integer({ min: 1, max: 9 }) }), {
    minLength: 1,
    maxLength: 3,
    selector: (water) => water.id,
  })
  .map((list) => {
    const sum = list.reduce((total, { weight }) => total + weight, 0);
    return list.map(({ weight, ...water }) => ({ ...water, percent: (100 * weight) / sum }));
  });

const ownStep: fc.Arbitrary<OwnStep> = fc
  .tuple(
    fc.record({
      id: fc.constantFrom('own-a', 'own-b', 'own-c', 'steep', 'tea-in'),
      title: words(20),
      done: fc.oneof(
        fc.record({ by: fc.constant('hand' as const) }),
        fc.record({ by: fc.constant('timer' as const), durationS: above0(3600) }),
      ),
    }),
    optional<Omit<OwnStep, 'id' | 'title' | 'done'>>({
      detail: words(30),
      afterStepId: fc.constantFrom('fill', 'steep', 'tea-out', 'nowhere', 'own-a'),
      asks: fc.constantFrom(...measuredQuantitySchema.options),
      meanwhile: fc.array(fc.record({ id, text: words(20) }), { maxLength: 2 }),
      cautions: fc.uniqueArray(fc.constantFrom(...cautionSchema.options), { maxLength: 2 }),
    }),
  )
  .map(([one, more]) => ({ ...one, ...more }));

const phRange = fc.tuple(typed(2, 9), typed(2, 9)).map(([a, b]) => ({ min: Math.min(a, b), max: Math.max(a, b) }));

/** Any recipe document that the schema takes, with ids from a small set, so that two of them share some. */
export const recipeDocuments: fc.Arbitrary<RecipeDocument> = fc
  .record({
    v: fc.constant(2 as const),
    volumeL: above0(500),
    waterL: above0(600),
    waters,
    additions: fc.uniqueArray(addition, { maxLength: 5, selector: (one) => one.id }),
    steepC: typed(1, 100),
    transferC: typed(0, 60),
    gas: fc.record({ volumes: typed(0, 6), tempC: typed(0, 30) }),
    targets: fc
      .tuple(
        fc.record({ waterPh: phRange }),
        optional<Omit<RecipeDocument['targets'], 'waterPh'>>({
          drinkPh: phRange,
          caffeineMostMgPerL: above0(2000),
        }),
      )
      .map(([one, more]) => ({ ...one, ...more })),
    steps: fc
      .tuple(
        fc.record({ own: fc.uniqueArray(ownStep, { maxLength: 3, selector: (step) => step.id }) }),
        optional<{ order: string[] }>({
          order: fc.array(fc.constantFrom('fill', 'steep', 'tea-out', 'tea-in', 'nowhere', 'own-a'), { maxLength: 6 }),
        }),
      )
      .map(([one, more]) => ({ ...one, ...more })),
    assume: optional<Required<RecipeDocument['assume']>>({
      fillC: typed(0, 60),
      roomC: typed(0, 45),
      servingMl: above0(2000),
      lidOn: fc.boolean(),
      chillerConstantPerS: real(0.0001, 0.05),
      teaBaseRatio: typed(0, 20),
      hopBaseRatio: typed(0, 20),
    }),
  })
  .filter((document) => recipeDocumentSchema.safeParse(document).success);

/**
 * Two documents of which the later was made from the earlier: most members are the same. With two documents from nothing, nearly
 * everything would differ, and a difference that nobody lists would never be noticed.
 */
export const revisedDocuments: fc.Arbitrary<[RecipeDocument, RecipeDocument]> = fc
  .tuple(recipeDocuments, recipeDocuments, chances())
  .map(([before, other, takes]): [RecipeDocument, RecipeDocument] => [before, grafted(before, other, takes)])
  .filter(([, after]) => recipeDocumentSchema.safeParse(after).success);

/** A document and two that were made from it. */
export const revisedTwice: fc.Arbitrary<[RecipeDocument, RecipeDocument, RecipeDocument]> = fc
  .tuple(revisedDocuments, recipeDocuments, chances())
  .map(([[base, mine], other, takes]): [RecipeDocument, RecipeDocument, RecipeDocument] => [
    base,
    mine,
    grafted(base, other, takes),
  ])
  .filter(([, , theirs]) => recipeDocumentSchema.safeParse(theirs).success);

/** True one time in twelve. */
function chances(): fc.Arbitrary<() => boolean> {
  return fc.infiniteStream(fc.integer({ min: 0, max: 11 })).map((stream) => () => stream.next().value === 0);
}

/** `before` with some of its parts, large or small, taken from `other`. */
function grafted<T>(before: T, other: T, takes: () => boolean): T;
function grafted(before: unknown, other: unknown, takes: () => boolean): unknown {
  if (takes()) return other;
  if (Array.isArray(before) && Array.isArray(other)) return graftedList(before, other, takes);
  return isPlainObject(before) && isPlainObject(other) ? graftedMembers(before, other, takes) : before;
}

/** Items changed, taken out, added at the end, or all in the opposite order. */
function graftedList(before: readonly unknown[], other: readonly unknown[], takes: () => boolean): unknown[] {
  const list = before.flatMap((item, index) => {
    if (takes()) return [];
    return [index < other.length ? grafted(item, other[index], takes) : item];
  });
  const longer = takes() ? [...list, ...other.slice(before.length)] : list;
  return takes() ? longer.reverse() : longer;
}

function graftedMembers(
  before: Record<string, unknown>,
  other: Record<string, unknown>,
  takes: () => boolean,
): Record<string, unknown> {
  const keys = [...new Set([...Object.keys(before), ...Object.keys(other)])];
  const entries = keys.flatMap((key): [string, unknown][] => {
    if (key in before && key in other) return [[key, grafted(before[key], other[key], takes)]];
    if (key in before) return takes() ? [] : [[key, before[key]]];
    return takes() ? [[key, other[key]]] : [];
  });
  return Object.fromEntries(entries);
}

function isPlainObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
