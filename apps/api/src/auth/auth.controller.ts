import { Body, Controller, HttpCode, Inject, Ip, Post, Req, Res } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { SignInAnswer } from '@app/contracts';
import { CONFIG, type Config } from '@app/platform';
import type { CookieOptions, Request, Response } from 'express';
import { AuthService, type Tokens } from './auth.service';
import { SignInDto } from './dto/sign-in.dto';
import { Public } from './public';
import { REFRESH_LIFETIME } from './refresh-tokens.service';

const COOKIE = 'ebbline_refresh';

@ApiTags('sign-in')
@Controller('auth')
export class AuthController {
  constructor(
    private readonly auth: AuthService,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  @Post('sign-in')
  @Public()
  @HttpCode(200)
  async signIn(
    @Body() body: SignInDto,
    @Ip() address: string,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SignInAnswer> {
    return this.answer(response, await this.auth.signIn(body.email, body.password, address));
  }

  @Post('refresh')
  @Public()
  @HttpCode(200)
  async refresh(
    @Req() request: Request,
    @Ip() address: string,
    @Res({ passthrough: true }) response: Response,
  ): Promise<SignInAnswer | undefined> {
    const token = tokenOf(request);
    if (token !== undefined) return this.answer(response, await this.auth.refresh(token, address));
    // Nobody has signed in here, which is no failure; a cookie that brings nothing is one.
    response.status(204);
    return undefined;
  }

  @Post('sign-out')
  @Public()
  @HttpCode(204)
  async signOut(
    @Req() request: Request,
    @Ip() address: string,
    @Res({ passthrough: true }) response: Response,
  ): Promise<void> {
    await this.auth.signOut(tokenOf(request), address);
    response.clearCookie(COOKIE, this.cookieOptions());
  }

  private answer(response: Response, tokens: Tokens): SignInAnswer {
    response.cookie(COOKIE, tokens.refreshToken, { ...this.cookieOptions(), maxAge: REFRESH_LIFETIME });
    response.setHeader('cache-control', 'no-store');
    return { accessToken: tokens.accessToken };
  }

  private cookieOptions(): CookieOptions {
    const secure = this.config.publicUrl.startsWith('https://');
    return { httpOnly: true, sameSite: 'strict', path: '/api/auth', secure };
  }
}

function tokenOf(request: Request): string | undefined {
  const token: unknown = (request.cookies as Record<string, unknown> | undefined)?.[COOKIE];
  return typeof token === 'string' && token !== '' ? token : undefined;
}
