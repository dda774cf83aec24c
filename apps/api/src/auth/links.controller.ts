import { Body, Controller, Get, Header, HttpCode, Ip, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { LinkAnswer, LinkView } from '@app/contracts';
import { LinkDto, PasswordResetDto } from './dto/link.dto';
import { LinksService } from './links.service';
import { PasswordResetService } from './password-reset.service';
import { Public } from './public';

@ApiTags('sign-in')
@Controller('auth')
export class LinksController {
  constructor(
    private readonly links: LinksService,
    private readonly resets: PasswordResetService,
  ) {}

  /** The same answer whether or not anybody has the address. */
  @Post('password-reset')
  @Public()
  @HttpCode(202)
  requestReset(@Body() body: PasswordResetDto, @Ip() address: string): Promise<void> {
    return this.resets.request(body.email, address);
  }

  @Get('links/:token')
  @Public()
  @Header('cache-control', 'no-store')
  view(@Param('token') token: string, @Ip() address: string): Promise<LinkView> {
    return this.links.view(token, address);
  }

  @Post('links/:token')
  @Public()
  @HttpCode(200)
  choosePassword(@Param('token') token: string, @Body() body: LinkDto, @Ip() address: string): Promise<LinkAnswer> {
    return this.links.choosePassword(token, body, address);
  }
}
