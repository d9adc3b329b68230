import { Injectable } from '@nestjs/common';
import type { Session, SignIn } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import { HubConfig } from '../config/environment.js';
import { isPasswordRight } from '../common/passwords.js';
import { HousesService, presentHouse } from '../houses/houses.service.js';
import { MembersService, presentMember } from '../members/members.service.js';
import { AccessTokensService } from '../sessions/access-tokens.service.js';
import { SessionsService, type OpenedSession } from '../sessions/sessions.service.js';

/** A session with the refresh token that goes into the cookie, never into the body. */
export interface SignedIn {
  session: Session;
  refreshToken: string;
  refreshExpiresAtMs: number;
}

@Injectable()
export class AuthService {
  constructor(
    private readonly members: MembersService,
    private readonly houses: HousesService,
    private readonly sessions: SessionsService,
    private readonly accessTokens: AccessTokensService,
    private readonly config: HubConfig,
  ) {}

  /** Signs in to the house in which the person has been a member longest. Every way to fail looks the same from outside. */
  async signIn({ email, password }: SignIn, userAgent: string): Promise<SignedIn> {
    const account = await this.members.findAccount(email);
    const isRight = await isPasswordRight(password, account?.user.passwordHash ?? null);
    const membership = await this.firstOpen(account?.memberships ?? []);
    if (!isRight || !membership) throw new ProblemError('wrong-credentials', 'Check both and try again.');
    const opened = await this.sessions.open({ houseId: membership.houseId, memberId: membership.id }, userAgent);
    return this.present(opened);
  }

  /** The next access token, with the role the member has by now. */
  async refresh(refreshToken: string): Promise<SignedIn> {
    return this.present(await this.sessions.rotate(refreshToken));
  }

  async signOut(refreshToken: string): Promise<void> {
    await this.sessions.closeByToken(refreshToken);
  }

  private async firstOpen<M extends { houseId: string }>(memberships: M[]): Promise<M | null> {
    for (const membership of memberships) if (this.isOpen(await this.houses.get(membership.houseId))) return membership;
    return null;
  }

  /** The passwords of the demo house are no secret: it is open only where the demo is wanted. */
  private isOpen({ isDemo }: { isDemo: boolean }): boolean {
    return !isDemo || this.config.isDemo;
  }

  private async present(opened: OpenedSession): Promise<SignedIn> {
    const { houseId, memberId, sessionId, refreshToken, refreshExpiresAtMs } = opened;
    const [member, house] = await Promise.all([this.members.get(houseId, memberId), this.houses.get(houseId)]);
    if (!member.isActive || !this.isOpen(house)) throw new ProblemError('session-expired', 'Sign in again.');
    const { userId, role } = member;
    const { accessToken, expiresAtMs } = await this.accessTokens.sign({ userId, memberId, houseId, role, sessionId });
    return {
      session: { accessToken, expiresAtMs, member: presentMember(member), house: presentHouse(house) },
      refreshToken,
      refreshExpiresAtMs,
    };
  }
}
