import type { Addition, OwnStep, RecipeDocument, WaterPart } from '../sheets/index.js';
import { inWords, type Texts, type Words } from './differences-words.js';

/** One member of a document that can change by itself. */
export interface Fact {
  /** The same in both documents. */
  key: string;
  /** As a form names it. */
  path: string;
  what: string;
  value: unknown;
  texts: Texts;
  /** Said where the other document has none. */
  absent: string;
  /** Shorter, where both documents have a condition of the same sort: "hops in 62 → 60 °C" and not "at 62 °C → at 60 °C". */
  brief?: { sort: string; what: string; texts: Texts };
}

/** A thing with members, found in both documents: where it stands, what it is called, and its key. */
export interface Place {
  key: string;
  path: string;
  label: string;
}

/** Nothing when the member is not there. */
function optional<T>(fact: Omit<Fact, 'value' | 'texts'>, value: T | undefined, texts: (value: T) => Texts): Fact[] {
  return value === undefined ? [] : [{ ...fact, value, texts: texts(value) }];
}

const range = ({ min, max }: { min: number; max: number }): Texts => [`${min} to ${max}`];
const onOff = (isOn: boolean): Texts => [isOn ? 'on' : 'off'];

/** What is neither in a list nor in the list of steps. */
export function documentFacts(document: RecipeDocument, say: Words): Fact[] {
  const { v: _, waters: _waters, additions: _additions, steps: _steps, ...rest } = document;
  const { volumeL, waterL, steepC, transferC, gas, targets, assume, ...more } = rest;
  // A member that a later version of the document brings does not compile until it is told here.
  more satisfies Record<string, never>;
  const always = (path: string, what: string, value: unknown, texts: Texts): Fact => ({
    ...{ key: path, path, what, value, texts },
    absent: '',
  });
  return [
    always('volumeL', 'drink', volumeL, say.volume(volumeL)),
    always('waterL', 'water', waterL, say.volume(waterL)),
    always('steepC', 'steep at', steepC, say.temp(steepC)),
    always('transferC', 'transfer at', transferC, say.temp(transferC)),
    always('gas.volumes', 'gas', gas.volumes, say.plain(gas.volumes, 'volumes')),
    always('gas.tempC', 'keg at', gas.tempC, say.temp(gas.tempC)),
    always('targets.waterPh', 'pH of the water', targets.waterPh, range(targets.waterPh)),
    ...targetFacts(targets, say),
    ...assumptionFacts(assume, say),
  ];
}

function targetFacts({ drinkPh, caffeineMostMgPerL }: RecipeDocument['targets'], say: Words): Fact[] {
  const target = (path: string, what: string) => ({ key: path, path, what, absent: 'no target' });
  return [
    ...optional(target('targets.drinkPh', 'pH of the drink'), drinkPh, range),
    ...optional(target('targets.caffeineMostMgPerL', 'caffeine at most'), caffeineMostMgPerL, (mgPerL) =>
      say.plain(mgPerL, 'mg/L'),
    ),
  ];
}

function assumptionFacts(assume: RecipeDocument['assume'], say: Words): Fact[] {
  const { fillC, roomC, servingMl, lidOn, chillerConstantPerS, teaBaseRatio, hopBaseRatio, ...more } = assume;
  more satisfies Record<string, never>;
  const taken = (name: keyof typeof assume, what: string) => {
    const path = `assume.${name}`;
    return { key: path, path, what, absent: 'as usual' };
  };
  return [
    ...optional(taken('fillC', 'water from the tap at'), fillC, say.temp),
    ...optional(taken('roomC', 'room at'), roomC, say.temp),
    ...optional(taken('servingMl', 'serving'), servingMl, (ml) => say.volume(ml / 1000)),
    ...optional(taken('lidOn', 'lid'), lidOn, onOff),
    ...optional(taken('chillerConstantPerS', 'chiller constant'), chillerConstantPerS, (k) => say.plain(k, 'a second')),
    ...optional(taken('teaBaseRatio', 'base from the tea'), teaBaseRatio, (ratio) => say.plain(ratio, '× usual')),
    ...optional(taken('hopBaseRatio', 'base from the hops'), hopBaseRatio, (ratio) => say.plain(ratio, '× usual')),
  ];
}

/** What the members of one kind of addition are called; one that is not named here is listed under its own name. */
const memberWords: Readonly<Record<string, { what: string; unit?: string; absent?: string }>> = {
  salt: { what: 'salt' },
  assayPercent: { what: 'assay', unit: '%', absent: 'pure' },
  acid: { what: 'acid' },
  strengthPercent: { what: 'strength', unit: '%', absent: 'pure' },
  tea: { what: 'kind of tea' },
  form: { what: 'form' },
  caffeineMgPerG: { what: 'caffeine', unit: 'mg/g', absent: 'that of its kind' },
  alphaPercent: { what: 'alpha', unit: '%' },
  storageIndex: { what: 'storage index', absent: 'not measured' },
};

export interface AdditionWords {
  say: Words;
  /** Grams per litre are said as well where the water changed: 60 g in 22 L are not 60 g in 11 L. */
  waterL: number | null;
}

const keepsTexts = { mass: ['keeps its grams'], 'g-per-l': ['keeps its grams per litre'] } as const;

function amountTexts({ massG, keeps }: Addition, waterL: number | null, say: Words): Texts {
  if (waterL === null || keeps === 'mass') return say.mass(massG);
  const doses = say.dose(massG / waterL);
  return say.mass(massG).map((text, level) => `${text} (${doses[level] ?? ''})`);
}

/** All members of an addition but its id and its kind. */
export function additionFacts(addition: Addition, place: Place, { say, waterL }: AdditionWords): Fact[] {
  const { id: _id, kind: _kind, name, massG, keeps, bag, ingredientId, in: goesIn, ...facts } = addition;
  const { label } = place;
  const member = (key: string, what: string, absent = 'none') => memberOf(place, key, what, absent);
  return [
    { ...member('name', 'name'), value: name, texts: [`“${name}”`] },
    { ...member('massG', label), value: massG, texts: amountTexts(addition, waterL, say) },
    { ...member('keeps', `${label}, when scaled,`), value: keeps, texts: keepsTexts[keeps] },
    {
      ...member('in', `${label} in`),
      value: goesIn,
      texts: say.in(goesIn),
      ...(goesIn.at === 'falling' && {
        brief: { sort: 'falling', what: `${label} in`, texts: say.temp(goesIn.tempC) },
      }),
    },
    ...('out' in addition ? [outFact(addition, place, say)] : []),
    ...optional(member('bag', `${label}, bag`), bag, (text) => [text, `“${text}”`]),
    ...optional(member('ingredientId', `${label}, in the stores`, 'not linked'), ingredientId, (id) => [
      'linked',
      `linked to ${id}`,
    ]),
    ...Object.entries(facts).flatMap(([key, value]) => {
      if (typeof value === 'object') return [];
      const { what = inWords(key), unit, absent } = memberWords[key] ?? {};
      return optional(member(key, `${label}, ${what}`, absent), value, (one) =>
        typeof one === 'string' ? [inWords(one), one] : say.plain(one, unit),
      );
    }),
  ];
}

function memberOf(place: Place, key: string, what: string, absent = 'none') {
  return { key: `${place.key}.${key}`, path: `${place.path}.${key}`, what, absent };
}

function outFact(addition: Extract<Addition, { out: unknown }>, place: Place, say: Words): Fact {
  const { kind, out } = addition;
  const { label } = place;
  const fact: Fact = { ...memberOf(place, 'out', `${label} out`), value: out, texts: say.out(out) };
  if (out.at === 'falling') {
    return { ...fact, brief: { sort: 'falling', what: `${label} out`, texts: say.temp(out.tempC) } };
  }
  if (out.at === 'transfer') return fact;
  const what = kind === 'tea' ? `${label} steep` : `${label} stands`;
  return { ...fact, brief: { sort: 'timer', what, texts: say.duration(out.durationS) } };
}

const ionWords: Readonly<Record<string, string>> = {
  caMgPerL: 'calcium',
  mgMgPerL: 'magnesium',
  naMgPerL: 'sodium',
  kMgPerL: 'potassium',
  clMgPerL: 'chloride',
  so4MgPerL: 'sulfate',
};

/** All members of a water but its id. */
export function waterFacts({ id: _id, name, percent, report, ...more }: WaterPart, place: Place, say: Words): Fact[] {
  more satisfies Record<string, never>;
  const { alkalinity, ...ions } = report;
  const { label } = place;
  return [
    { ...memberOf(place, 'name', 'name of the water'), value: name, texts: [`“${name}”`] },
    {
      ...memberOf(place, 'percent', `${label}, share`),
      value: percent,
      texts: [...say.plain(Number(percent.toFixed(1)), '%'), ...say.plain(percent, '%')],
    },
    ...Object.entries(ions).flatMap(([key, value]) =>
      optional(memberOf(place, `report.${key}`, `${label}, ${ionWords[key] ?? inWords(key)}`), value, (mgPerL) =>
        say.plain(mgPerL, 'mg/L'),
      ),
    ),
    {
      ...memberOf(place, 'report.alkalinity', `${label}, alkalinity`),
      value: alkalinity,
      texts: say.plain(alkalinity.mgPerL, alkalinity.as === 'hco3' ? 'mg/L as HCO₃' : 'mg/L as CaCO₃'),
    },
  ];
}

/** All members of a step of the brewer's own but its id. */
export function ownStepFacts({ id: _id, ...step }: OwnStep, place: Place, say: Words): Fact[] {
  const { title, detail, afterStepId, done, asks, meanwhile, cautions, ...more } = step;
  more satisfies Record<string, never>;
  const { label } = place;
  return [
    { ...memberOf(place, 'title', 'step'), value: title, texts: [`“${title}”`] },
    ...optional(memberOf(place, 'detail', `${label}, words`), detail, (text) => [`“${text}”`]),
    ...optional(memberOf(place, 'afterStepId', `${label} follows`, 'nothing'), afterStepId, (id) => [inWords(id), id]),
    {
      ...memberOf(place, 'done', `${label} done`),
      value: done,
      texts: done.by === 'hand' ? ['by hand'] : say.duration(done.durationS).map((text) => `after ${text}`),
    },
    ...optional(memberOf(place, 'asks', `${label} asks for`, 'nothing'), asks, (quantity) => [inWords(quantity)]),
    ...optional(memberOf(place, 'meanwhile', `${label}, meanwhile`), meanwhile, (tasks) => [
      tasks.map(({ text }) => text).join(', ') || 'nothing',
    ]),
    ...optional(memberOf(place, 'cautions', `${label}, cautions`), cautions, (list) => [list.join(', ') || 'no mark']),
  ];
}
