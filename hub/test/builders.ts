import { getModelToken } from '@nestjs/sequelize';
import type { CreateEquipment, Role, RunSummary } from '@steepfall/shared/contracts';
import type { RunEvent, RunEventOf, RunEventType } from '@steepfall/shared/runs';
import type { RecipeDocument } from '@steepfall/shared/sheets';
import { buildDocument } from '@steepfall/shared/testing';
import type { Model, ModelStatic } from 'sequelize';
import type { Actor } from '../src/common/access/actor.js';
import { Batch } from '../src/batches/models/batch.model.js';
import { newId } from '../src/common/ids.js';
import { hashPassword } from '../src/common/passwords.js';
import { hashSecret } from '../src/common/secrets.js';
import { Equipment } from '../src/equipment/models/equipment.model.js';
import { House } from '../src/houses/models/house.model.js';
import { Membership } from '../src/members/models/membership.model.js';
import { User } from '../src/members/models/user.model.js';
import { newDeviceToken } from '../src/probes/device-token.js';
import { Probe } from '../src/probes/models/probe.model.js';
import { RecipeRevision } from '../src/recipes/models/recipe-revision.model.js';
import { Recipe } from '../src/recipes/models/recipe.model.js';
import { RunsService } from '../src/runs/runs.service.js';
import { AccessTokensService } from '../src/sessions/access-tokens.service.js';
import { SessionsService } from '../src/sessions/sessions.service.js';
import { Ingredient } from '../src/stores/models/ingredient.model.js';
import { LotMove } from '../src/stores/models/lot-move.model.js';
import { Lot } from '../src/stores/models/lot.model.js';
import type { TestApp } from './create-test-app.js';

export const TEST_PASSWORD = 'a password of the specs';
let sharedHash: Promise<string> | undefined;
let serial = 0;

/** The model as the running hub uses it. */
export function modelOf<M extends Model>({ app }: TestApp, model: ModelStatic<M>): ModelStatic<M> {
  return app.get<ModelStatic<M>>(getModelToken(model), { strict: false });
}

export function buildHouse(testApp: TestApp, overrides: { name?: string; altitudeM?: number } = {}): Promise<House> {
  serial += 1;
  return modelOf(testApp, House).create({
    id: newId(),
    name: `House ${serial}`,
    altitudeM: 120,
    createdAtMs: Date.now(),
    ...overrides,
  });
}

export interface MemberOverrides {
  house?: House;
  role?: Role;
  email?: string;
  displayName?: string;
  isActive?: boolean;
}

export interface BuiltMember {
  house: House;
  user: User;
  member: Membership;
  email: string;
  password: string;
}

/** A member who can sign in with `TEST_PASSWORD`; makes the house when none is given. */
export async function buildMember(testApp: TestApp, overrides: MemberOverrides = {}): Promise<BuiltMember> {
  serial += 1;
  const house = overrides.house ?? (await buildHouse(testApp));
  const role = overrides.role ?? 'brewer';
  const email = overrides.email ?? `${role}-${serial}@house.example`;
  sharedHash ??= hashPassword(TEST_PASSWORD);
  const users = modelOf(testApp, User);
  const user =
    (await users.findOne({ where: { email } })) ??
    (await users.create({ id: newId(), email, passwordHash: await sharedHash, createdAtMs: Date.now() }));
  const member = await modelOf(testApp, Membership).create({
    id: newId(),
    houseId: house.id,
    userId: user.id,
    displayName: overrides.displayName ?? `A ${role}`,
    role,
    isActive: overrides.isActive ?? true,
    createdAtMs: Date.now() + serial,
  });
  return { house, user, member, email, password: TEST_PASSWORD };
}

const usualEquipment = {
  kettle: {
    kind: 'kettle',
    name: 'Kettle',
    facts: { volumeL: 30, diameterM: 0.36, massKg: 4, heaterPowerW: 3000, heaterEfficiency: 0.9 },
  },
  chiller: { kind: 'chiller', name: 'Coil', facts: { metal: 'stainless', lengthM: 7.6, coolantC: 13 } },
  keg: { kind: 'keg', name: 'Keg', facts: { volumeL: 19, tareG: 4200, ratedKPa: 900 } },
  scale: { kind: 'scale', name: 'Scale', facts: { resolutionG: 0.1, capacityG: 3000 } },
} satisfies Record<string, CreateEquipment>;

export function usualEquipmentOf<Kind extends keyof typeof usualEquipment>(kind: Kind): (typeof usualEquipment)[Kind] {
  return usualEquipment[kind];
}

export function buildEquipment(
  testApp: TestApp,
  house: House,
  kind: CreateEquipment['kind'],
  overrides: { name?: string } = {},
): Promise<Equipment> {
  return modelOf(testApp, Equipment).create({
    id: newId(),
    houseId: house.id,
    ...usualEquipment[kind],
    createdAtMs: Date.now(),
    ...overrides,
  });
}

export const usualDocument = buildDocument();

/** A recipe with as many revisions as documents are given; one without any. */
export async function buildRecipe(
  testApp: TestApp,
  overrides: { author?: BuiltMember; name?: string; documents?: RecipeDocument[] } = {},
): Promise<{ recipe: Recipe; revisions: RecipeRevision[]; author: BuiltMember }> {
  serial += 1;
  const author = overrides.author ?? (await buildMember(testApp));
  const houseId = author.house.id;
  const recipe = await modelOf(testApp, Recipe).create({
    id: newId(),
    houseId,
    name: overrides.name ?? `Recipe ${serial}`,
    summary: 'For specs.',
    createdAtMs: Date.now() + serial,
  });
  const revisions: RecipeRevision[] = [];
  for (const [index, document] of (overrides.documents ?? [usualDocument]).entries()) {
    const revision = await modelOf(testApp, RecipeRevision).create({
      id: newId(),
      houseId,
      recipeId: recipe.id,
      number: index + 1,
      note: `Revision ${index + 1}`,
      createdAtMs: Date.now(),
      createdBy: author.member.id,
      volumeL: document.volumeL,
      document,
    });
    revisions.push(revision);
  }
  return { recipe, revisions, author };
}

export interface BatchParts {
  revisionId: string;
  kettleId: string;
  chillerId: string;
  kegId: string;
  plannedOn: string;
  probeId: string | null;
}

/** What `POST /api/batches` takes: a recipe and the equipment to brew it on, in the house of the author. */
export async function buildBatchParts(testApp: TestApp, author: BuiltMember): Promise<BatchParts> {
  const { revisions } = await buildRecipe(testApp, { author });
  const [kettle, chiller, keg] = await Promise.all(
    (['kettle', 'chiller', 'keg'] as const).map((kind) => buildEquipment(testApp, author.house, kind)),
  );
  return {
    revisionId: revisions[0]!.id,
    kettleId: kettle!.id,
    chillerId: chiller!.id,
    kegId: keg!.id,
    plannedOn: '2026-05-04',
    probeId: null,
  };
}

/** A planned batch, with everything it needs. */
export async function buildBatch(
  testApp: TestApp,
  overrides: { author?: BuiltMember; probeId?: string } = {},
): Promise<{ batch: Batch; author: BuiltMember; parts: BatchParts }> {
  serial += 1;
  const author = overrides.author ?? (await buildMember(testApp));
  const parts = { ...(await buildBatchParts(testApp, author)), probeId: overrides.probeId ?? null };
  const batch = await modelOf(testApp, Batch).create({
    id: newId(),
    houseId: author.house.id,
    ...parts,
    year: 2025,
    numberInYear: serial,
    batchNumber: `25-${serial}`,
    volumeL: usualDocument.volumeL,
    createdAtMs: Date.now(),
    createdBy: author.member.id,
  });
  return { batch, author, parts };
}

/** A lot of hops with this much in its book; of an ingredient of its own unless one is named. */
export async function buildLot(
  testApp: TestApp,
  author: BuiltMember,
  overrides: { ingredientId?: string; code?: string; massG?: number } = {},
): Promise<Lot> {
  serial += 1;
  const owned = { houseId: author.house.id, createdAtMs: Date.now() };
  const { massG = 100, code = `Lot ${serial}` } = overrides;
  const ingredientId =
    overrides.ingredientId ??
    (
      await modelOf(testApp, Ingredient).create({
        ...owned,
        id: newId(),
        kind: 'hops',
        name: `Hops ${serial}`,
        facts: { form: 'pellets', lowStockG: null, allergens: '' },
      })
    ).id;
  const lot = await modelOf(testApp, Lot).create({
    ...owned,
    id: newId(),
    ingredientId,
    code,
    receivedOn: '2026-03-01',
    bestBefore: null,
    pricePerKg: null,
    note: '',
    hops: null,
  });
  const { houseId, createdAtMs } = owned;
  const line = { id: newId(), houseId, lotId: lot.id, kind: 'received', massG, reason: '', atMs: createdAtMs } as const;
  await modelOf(testApp, LotMove).create({ ...line, madeBy: author.member.id });
  return lot;
}

export interface SignedInMember extends BuiltMember {
  actor: Actor;
  accessToken: string;
  /** The value of the `Authorization` header. */
  bearer: string;
}

/** A member of this role with an access token, without the cost of a password check: `signInAs(testApp, 'hand', { house })`. */
export async function signInAs(
  testApp: TestApp,
  role: Role,
  overrides: Omit<MemberOverrides, 'role'> = {},
): Promise<SignedInMember> {
  const built = await buildMember(testApp, { ...overrides, role });
  const { house, user, member } = built;
  const session = await testApp.app
    .get(SessionsService, { strict: false })
    .open({ houseId: house.id, memberId: member.id }, 'spec');
  const identity = { memberId: member.id, userId: user.id, houseId: house.id, role, sessionId: session.sessionId };
  const { accessToken, expiresAtMs } = await testApp.app.get(AccessTokensService, { strict: false }).sign(identity);
  return { ...built, actor: { ...identity, expiresAtMs }, accessToken, bearer: `Bearer ${accessToken}` };
}

/** A probe with a token that opens the door for it. */
export async function buildProbe(
  testApp: TestApp,
  house: House,
  overrides: { name?: string; lagS?: number; samplePeriodS?: number } = {},
): Promise<{ probe: Probe; deviceToken: string; bearer: string }> {
  serial += 1;
  const id = newId();
  const deviceToken = newDeviceToken(id);
  const probe = await modelOf(testApp, Probe).create({
    id,
    houseId: house.id,
    name: `Probe ${serial}`,
    lagS: 7.5,
    resolutionC: 0.0625,
    samplePeriodS: 1,
    tokenHash: hashSecret(deviceToken),
    createdAtMs: Date.now(),
    ...overrides,
  });
  return { probe, deviceToken, bearer: `Bearer ${deviceToken}` };
}

/** A run of a planned batch that has just begun, with a probe in its kettle. */
export async function buildRun(
  testApp: TestApp,
  overrides: { author?: SignedInMember } = {},
): Promise<{ run: RunSummary; author: SignedInMember; batch: Batch; probe: Probe; deviceToken: string }> {
  const author = overrides.author ?? (await signInAs(testApp, 'brewer'));
  const { probe, deviceToken } = await buildProbe(testApp, author.house);
  const { batch } = await buildBatch(testApp, { author, probeId: probe.id });
  const run = await testApp.app.get(RunsService, { strict: false }).startBatch(author.actor, batch.id);
  return { run, author, batch, probe, deviceToken };
}

/** What a tablet writes: an act of this member in this run, now. */
export function buildEvent<Type extends RunEventType>(
  run: Pick<RunSummary, 'id'>,
  by: SignedInMember | null,
  type: Type,
  payload: RunEventOf<Type>['payload'],
  overrides: Partial<Pick<RunEvent, 'id' | 'runId' | 'atMs' | 'station'>> = {},
): RunEventOf<Type> {
  const envelope = { id: newId(), runId: run.id, v: 1, atMs: Date.now(), by: by?.member.id ?? null, station: 'tablet' };
  return { ...envelope, type, payload, ...overrides } as RunEventOf<Type>;
}
