import { Module } from '@nestjs/common';
import { JwtModule } from '@nestjs/jwt';
import { SequelizeModule } from '@nestjs/sequelize';
import { HubConfig } from '../config/environment.js';
import { AccessTokensService } from './access-tokens.service.js';
import { SessionToken } from './models/session-token.model.js';
import { Session } from './models/session.model.js';
import { SessionsService } from './sessions.service.js';

@Module({
  imports: [
    SequelizeModule.forFeature([Session, SessionToken]),
    JwtModule.registerAsync({
      inject: [HubConfig],
      useFactory: (config: HubConfig) => ({
        secret: config.jwtSecret,
        signOptions: { algorithm: 'HS256' },
        verifyOptions: { algorithms: ['HS256'] },
      }),
    }),
  ],
  providers: [SessionsService, AccessTokensService],
  exports: [SessionsService, AccessTokensService],
})
export class SessionsModule {}
