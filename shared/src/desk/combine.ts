import {
  assumptionsSchema,
  recipeDocumentSchema,
  type Addition,
  type OwnStep,
  type RecipeDocument,
  type WaterPart,
} from '../sheets/index.js';
import type { UnitPreferences } from '../units/index.js';
import { Choices, thingAt, type Collision, type Thing, type Versions } from './combine-choice.js';
import { joinLists } from './combine-lists.js';
import { changesOf } from './differences.js';
import { inWords } from './differences-words.js';

export type { Collision } from './combine-choice.js';

export type Combined = { kind: 'combined'; document: RecipeDocument } | { kind: 'collides'; at: Collision[] };

/**
 * Two revisions that were both made from one, joined. What only one of them changed counts. Of an addition the amount, when it goes in
 * and comes out, and its facts are one thing each; so are the shares of the waters, and a step of the brewer's own. What both changed,
 * and not alike, is told instead; so is one that scaled the recipe while the other changed amounts, and what no recipe may be.
 *
 * @param base what both started from.
 * @param units of the person who reads what collides.
 */
export function combineRevisions(
  base: RecipeDocument,
  mine: RecipeDocument,
  theirs: RecipeDocument,
  units: UnitPreferences,
): Combined {
  const versions = { base, mine, theirs };
  const choices = new Choices({ mine: changesOf(base, mine, units), theirs: changesOf(base, theirs, units) });
  const document = joinDocuments(versions, choices);
  refuseScaledPast(versions, choices);
  if (choices.collisions.length === 0) refuseImpossible(document, choices);
  return choices.collisions.length === 0
    ? { kind: 'combined', document }
    : { kind: 'collides', at: choices.collisions };
}

function joinDocuments(versions: Versions<RecipeDocument>, choices: Choices): RecipeDocument {
  const of = <T>(get: (document: RecipeDocument) => T): Versions<T> => ({
    base: get(versions.base),
    mine: get(versions.mine),
    theirs: get(versions.theirs),
  });
  const pick = <T>(path: string, get: (document: RecipeDocument) => T) =>
    choices.pick(thingAt(path, inWords(path)), of(get));
  return {
    v: 2,
    volumeL: pick('volumeL', ({ volumeL }) => volumeL),
    waterL: pick('waterL', ({ waterL }) => waterL),
    waters: joinWaters(
      of(({ waters }) => waters),
      choices,
    ),
    additions: joinLists(
      of(({ additions }) => additions),
      choices,
      {
        path: 'additions',
        what: 'additions',
        nameOf: ({ name }) => name,
        join: (addition) => joinAdditions(addition, choices),
      },
    ),
    steepC: pick('steepC', ({ steepC }) => steepC),
    transferC: pick('transferC', ({ transferC }) => transferC),
    gas: {
      volumes: pick('gas.volumes', ({ gas }) => gas.volumes),
      tempC: pick('gas.tempC', ({ gas }) => gas.tempC),
    },
    targets: {
      waterPh: pick('targets.waterPh', ({ targets }) => targets.waterPh),
      drinkPh: pick('targets.drinkPh', ({ targets }) => targets.drinkPh),
      caffeineMostMgPerL: pick('targets.caffeineMostMgPerL', ({ targets }) => targets.caffeineMostMgPerL),
    },
    steps: {
      own: joinLists(
        of(({ steps }) => steps.own),
        choices,
        {
          path: 'steps.own',
          what: 'steps of your own',
          nameOf: ({ title }) => title,
          join: (step) => joinOwnSteps(step, choices),
        },
      ),
      order: pick('steps.order', ({ steps }) => steps.order),
    },
    assume: joinAssumptions(
      of(({ assume }) => assume),
      choices,
    ),
  };
}

function joinAdditions(versions: Versions<Addition>, choices: Choices): Addition {
  const { base, mine, theirs } = versions;
  const path = `additions.${mine.id}`;
  if (base.kind !== mine.kind || mine.kind !== theirs.kind) return choices.pick(thingAt(path, mine.name), versions);
  const thing = (isOf: (member: string) => boolean): Thing => ({
    what: mine.name,
    covers: (key) => key.startsWith(`${path}.`) && isOf(key.slice(path.length + 1)),
  });
  const pick = <T>(isOf: (member: string) => boolean, get: (addition: Addition) => T) =>
    choices.pick(thing(isOf), { base: get(base), mine: get(mine), theirs: get(theirs) });
  const amount = pick(isAmount, ({ massG, keeps }) => ({ massG, keeps }));
  const when = pick(isWhen, (addition) => ({ in: addition.in, out: 'out' in addition ? addition.out : undefined }));
  const facts =
    versions[
      choices.side(
        thing((member) => !isAmount(member) && !isWhen(member)),
        {
          base: factsOf(base),
          mine: factsOf(mine),
          theirs: factsOf(theirs),
        },
      )
    ];
  const joined = { ...facts, ...amount, in: when.in };
  return 'out' in joined && when.out ? { ...joined, out: when.out } : joined;
}

const isAmount = (member: string) => member === 'massG' || member === 'keeps';
const isWhen = (member: string) => member === 'in' || member === 'out';

/** An addition without what is chosen by itself. */
function factsOf(addition: Addition): object {
  const members = Object.entries(addition).filter(([member]) => !isAmount(member) && !isWhen(member));
  return Object.fromEntries(members);
}

function joinOwnSteps(versions: Versions<OwnStep>, choices: Choices): OwnStep {
  return choices.pick(thingAt(`steps.own.${versions.mine.id}`, versions.mine.title), versions);
}

/** The shares are one thing, since together they are all of the water. */
function joinWaters(versions: Versions<readonly WaterPart[]>, choices: Choices): WaterPart[] {
  const shares = (waters: readonly WaterPart[]) => waters.map(({ id, percent }) => ({ id, percent }));
  const thing: Thing = {
    what: 'waters',
    covers: (key) => key.startsWith('waters.') && !key.endsWith('.name') && !key.includes('.report.'),
  };
  const side = choices.side(thing, {
    base: shares(versions.base),
    mine: shares(versions.mine),
    theirs: shares(versions.theirs),
  });
  const contents = joinLists(versions, choices, {
    path: 'waters',
    what: 'waters',
    nameOf: ({ name }) => name,
    join: (water) => joinWater(water, choices),
  });
  return versions[side].map((water) => {
    const { name, report } = contents.find(({ id }) => id === water.id) ?? water;
    return { ...water, name, report };
  });
}

function joinWater(versions: Versions<WaterPart>, choices: Choices): WaterPart {
  const { base, mine, theirs } = versions;
  const path = `waters.${mine.id}`;
  const pick = <T>(member: string, get: (water: WaterPart) => T) =>
    choices.pick(thingAt(`${path}.${member}`, mine.name), { base: get(base), mine: get(mine), theirs: get(theirs) });
  return { ...mine, name: pick('name', ({ name }) => name), report: pick('report', ({ report }) => report) };
}

function joinAssumptions(versions: Versions<RecipeDocument['assume']>, choices: Choices): RecipeDocument['assume'] {
  const { base, mine, theirs } = versions;
  const joined = { ...mine };
  for (const name of assumptionsSchema.keyof().options) {
    const thing = thingAt(`assume.${name}`, inWords(name));
    const side = choices.side(thing, { base: base[name], mine: mine[name], theirs: theirs[name] });
    copyMember(joined, versions[side], name);
  }
  return joined;
}

function copyMember<T extends object, Name extends keyof T>(to: T, from: T, name: Name): void {
  if (from[name] === undefined) delete to[name];
  else to[name] = from[name];
}

/** One scaled, the other changed amounts that go with the water: joined, those would be for the wrong volume. */
function refuseScaledPast({ base, mine, theirs }: Versions<RecipeDocument>, choices: Choices): void {
  const [here, there] = [dosesOf(mine, base), dosesOf(theirs, base)];
  const isScaled = mine.waterL !== base.waterL || theirs.waterL !== base.waterL;
  if (!isScaled || mine.waterL === theirs.waterL || here.length === 0 || there.length === 0) return;
  const paths = [...here, ...there].map(({ id }) => `additions.${id}`);
  choices.collide({
    what: 'water and amounts',
    covers: (key) => key === 'waterL' || paths.some((path) => key === path || key === `${path}.massG`),
  });
}

/** Additions that go with the water, new or with another amount. */
function dosesOf({ additions }: RecipeDocument, base: RecipeDocument): Addition[] {
  return additions.filter(({ id, keeps, massG }) => {
    const was = base.additions.find((addition) => addition.id === id);
    return keeps === 'g-per-l' && was?.massG !== massG;
  });
}

/** What both may do, but not together: 41 additions, or two ends of a range that cross. */
function refuseImpossible(document: RecipeDocument, choices: Choices): void {
  for (const { path, message } of recipeDocumentSchema.safeParse(document).error?.issues ?? []) {
    const [head = ''] = path.map(String);
    choices.collide({ ...thingAt(head, message), what: message });
  }
}
