import { Body, Controller, Delete, Get, HttpCode, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { ApiTokenView, NewApiToken } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { ApiTokensService } from './api-tokens.service';
import { ApiTokenDto } from './dto/api-token.dto';

@ApiTags('api-tokens')
@Controller()
export class ApiTokensController {
  constructor(private readonly tokens: ApiTokensService) {}

  @Get('plants/:id/api-tokens')
  @Permit('upload_intake')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<ApiTokenView[]> {
    return this.tokens.list(person, plantId);
  }

  @Post('plants/:id/api-tokens')
  @Permit('upload_intake')
  make(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: ApiTokenDto,
  ): Promise<NewApiToken> {
    return this.tokens.make(person, plantId, body.name);
  }

  @Delete('plants/:id/api-tokens/:tokenId')
  @Permit('upload_intake')
  @HttpCode(204)
  revoke(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Param('tokenId', IdPipe) tokenId: number,
  ): Promise<void> {
    return this.tokens.revoke(person, plantId, tokenId);
  }
}
