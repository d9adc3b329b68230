import { Injectable } from '@nestjs/common';
import { PassportStrategy } from '@nestjs/passport';
import { ExtractJwt, Strategy } from 'passport-jwt';
import type { Actor } from '../common/access/actor.js';
import { HubConfig } from '../config/environment.js';
import { AccessTokensService } from '../sessions/access-tokens.service.js';

@Injectable()
export class JwtStrategy extends PassportStrategy(Strategy, 'jwt') {
  constructor(
    config: HubConfig,
    private readonly accessTokens: AccessTokensService,
  ) {
    super({
      jwtFromRequest: ExtractJwt.fromAuthHeaderAsBearerToken(),
      secretOrKey: config.jwtSecret,
      algorithms: ['HS256'],
    });
  }

  validate(claims: unknown): Actor {
    return this.accessTokens.actorOf(claims);
  }
}
