import { getModelToken } from '@nestjs/sequelize';
import type { Role } from '@steepfall/shared/contracts';
import type { Model, ModelStatic } from 'sequelize';
import type { Actor } from '../src/common/access/actor.js';
import { newId } from '../src/common/ids.js';
import { hashPassword } from '../src/common/passwords.js';
import { House } from '../src/houses/models/house.model.js';
import { Membership } from '../src/members/models/membership.model.js';
import { User } from '../src/members/models/user.model.js';
import { AccessTokensService } from '../src/sessions/access-tokens.service.js';
import { SessionsService } from '../src/sessions/sessions.service.js';
import type { TestApp } from './create-test-app.js';

export const TEST_PASSWORD = 'a password of the specs';
let sharedHash: Promise<string> | undefined;
let serial = 0;

/** The model as the running hub uses it. */
export function modelOf<M extends Model>({ app }: TestApp, model: ModelStatic<M>): ModelStatic<M> {
  return app.get<ModelStatic<M>>(getModelToken(model as never), { strict: false });
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
