import { Controller, Get, HttpCode, Param, Post, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { MailSentAgain, MailsView, MailView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { MailsQuery } from './dto/mails-query.dto';
import { MailsService } from './mails.service';

@ApiTags('mails')
@Controller()
export class MailsController {
  constructor(private readonly mails: MailsService) {}

  @Get('plants/:id/mails')
  @Permit('set_up_plant')
  list(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Query() query: MailsQuery,
  ): Promise<MailsView> {
    return this.mails.list(person, plantId, query);
  }

  @Get('mails/:id')
  @Permit('set_up_plant')
  find(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<MailView> {
    return this.mails.find(person, id);
  }

  @Post('mails/:id/send-again')
  @HttpCode(202)
  @Permit('set_up_plant')
  sendAgain(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<MailSentAgain> {
    return this.mails.sendAgain(person, id);
  }
}
