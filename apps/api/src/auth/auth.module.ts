import { Module } from '@nestjs/common';
import { APP_GUARD } from '@nestjs/core';
import { JwtModule } from '@nestjs/jwt';
import { PassportModule } from '@nestjs/passport';
import { CONFIG, type Config } from '@app/platform';
import { AuthController } from './auth.controller';
import { AuthService } from './auth.service';
import { JwtAuthGuard } from './jwt-auth.guard';
import { JwtStrategy } from './jwt.strategy';
import { LinksController } from './links.controller';
import { LinksService } from './links.service';
import { MeController } from './me.controller';
import { PasswordChecks } from './password-checks.service';
import { PasswordResetService } from './password-reset.service';
import { RefreshTokens } from './refresh-tokens.service';

@Module({
  imports: [
    PassportModule,
    JwtModule.registerAsync({ inject: [CONFIG], useFactory: (config: Config) => ({ secret: config.jwtSecret }) }),
  ],
  controllers: [AuthController, LinksController, MeController],
  providers: [
    AuthService,
    LinksService,
    PasswordResetService,
    PasswordChecks,
    RefreshTokens,
    JwtStrategy,
    { provide: APP_GUARD, useClass: JwtAuthGuard },
  ],
  exports: [PasswordChecks],
})
export class AuthModule {}
