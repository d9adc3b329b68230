import { Body, Controller, Post, Req, Res, UseGuards } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { sessionSchema, signInSchema, type Session, type SignIn } from '@steepfall/shared/contracts';
import { ProblemError } from '@steepfall/shared/problems';
import type { CookieOptions, Request, Response } from 'express';
import { Public } from '../common/access/access.decorators.js';
import { Answers, AnswersNothing } from '../common/http/answers.decorator.js';
import { AuthService, type SignedIn } from './auth.service.js';
import { SignInThrottler } from './sign-in.throttler.js';

export const REFRESH_COOKIE = 'steepfall_refresh';

/** No script reads it, no other site sends it, and nothing but these three routes ever sees it. */
function cookieOptions(request: Request): CookieOptions {
  return { httpOnly: true, sameSite: 'strict', secure: request.secure, path: '/api/auth' };
}

@ApiTags('auth')
@Controller('auth')
export class AuthController {
  constructor(private readonly auth: AuthService) {}

  @Post('sign-in')
  @Public()
  @UseGuards(SignInThrottler)
  @Answers(sessionSchema)
  async signIn(
    @Body({ schema: signInSchema }) body: SignIn,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): Promise<Session> {
    return this.hand(await this.auth.signIn(body, request.headers['user-agent'] ?? ''), request, response);
  }

  @Post('refresh')
  @Public()
  @Answers(sessionSchema)
  async refresh(@Req() request: Request, @Res({ passthrough: true }) response: Response): Promise<Session> {
    const token = refreshTokenOf(request);
    if (!token) throw new ProblemError('not-signed-in', 'Sign in first.');
    try {
      return this.hand(await this.auth.refresh(token), request, response);
    } catch (error) {
      if (error instanceof ProblemError) response.clearCookie(REFRESH_COOKIE, cookieOptions(request));
      throw error;
    }
  }

  @Post('sign-out')
  @Public()
  @AnswersNothing()
  async signOut(@Req() request: Request, @Res({ passthrough: true }) response: Response): Promise<void> {
    const token = refreshTokenOf(request);
    if (token) await this.auth.signOut(token);
    response.clearCookie(REFRESH_COOKIE, cookieOptions(request));
  }

  private hand({ session, refreshToken, refreshExpiresAtMs }: SignedIn, request: Request, response: Response): Session {
    response.cookie(REFRESH_COOKIE, refreshToken, {
      ...cookieOptions(request),
      expires: new Date(refreshExpiresAtMs),
    });
    return session;
  }
}

function refreshTokenOf(request: Request): string | null {
  const cookies = request.cookies as Record<string, unknown>;
  const token = cookies[REFRESH_COOKIE];
  return typeof token === 'string' && token !== '' ? token : null;
}
