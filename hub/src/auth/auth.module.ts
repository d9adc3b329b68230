import { Module } from '@nestjs/common';
import { PassportModule } from '@nestjs/passport';
import { ThrottlerModule } from '@nestjs/throttler';
import { HousesModule } from '../houses/houses.module.js';
import { MembersModule } from '../members/members.module.js';
import { SessionsModule } from '../sessions/sessions.module.js';
import { AuthController } from './auth.controller.js';
import { AuthService } from './auth.service.js';
import { JwtStrategy } from './jwt.strategy.js';
import { MeController } from './me.controller.js';
import { signInLimits } from './sign-in.throttler.js';

@Module({
  imports: [PassportModule, ThrottlerModule.forRoot(signInLimits), HousesModule, MembersModule, SessionsModule],
  controllers: [AuthController, MeController],
  providers: [AuthService, JwtStrategy],
})
export class AuthModule {}
