import { Body, Controller, Get, HttpCode, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { Page, PersonView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { InvitationDto, RolesDto } from './dto/people.dto';
import { InvitationsService } from './invitations.service';
import { PeopleService } from './people.service';

@ApiTags('people')
@Controller('plants/:id/people')
export class PeopleController {
  constructor(
    private readonly people: PeopleService,
    private readonly invitations: InvitationsService,
  ) {}

  @Get()
  @Permit('set_up_plant')
  list(@CurrentPerson() by: Person, @Param('id', IdPipe) id: number): Promise<Page<PersonView>> {
    return this.people.list(by, id);
  }

  @Post()
  @Permit('set_up_plant')
  invite(
    @CurrentPerson() by: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: InvitationDto,
  ): Promise<PersonView> {
    return this.invitations.invite(by, id, body);
  }

  @Post(':personId/invitation')
  @Permit('set_up_plant')
  @HttpCode(200)
  inviteAgain(
    @CurrentPerson() by: Person,
    @Param('id', IdPipe) id: number,
    @Param('personId', IdPipe) personId: number,
  ): Promise<PersonView> {
    return this.invitations.inviteAgain(by, id, personId);
  }

  @Patch(':personId')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() by: Person,
    @Param('id', IdPipe) id: number,
    @Param('personId', IdPipe) personId: number,
    @Body() body: RolesDto,
  ): Promise<PersonView> {
    return this.people.change(by, id, personId, body);
  }

  @Post(':personId/disable')
  @Permit('set_up_plant')
  @HttpCode(200)
  disable(
    @CurrentPerson() by: Person,
    @Param('id', IdPipe) id: number,
    @Param('personId', IdPipe) personId: number,
  ): Promise<PersonView> {
    return this.people.disable(by, id, personId);
  }

  @Post(':personId/enable')
  @Permit('set_up_plant')
  @HttpCode(200)
  enable(
    @CurrentPerson() by: Person,
    @Param('id', IdPipe) id: number,
    @Param('personId', IdPipe) personId: number,
  ): Promise<PersonView> {
    return this.people.enable(by, id, personId);
  }
}
