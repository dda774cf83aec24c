import { Body, Controller, Get, HttpCode, Ip, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { Page, SpecificationSetUpView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { PasswordChecks } from '../auth/password-checks.service';
import { IdPipe } from '../platform/id.pipe';
import { SpecificationApprovalDto, SpecificationProposalDto } from './dto/specification.dto';
import { SpecificationsService } from './specifications.service';

@ApiTags('set-up')
@Controller()
export class SpecificationsController {
  constructor(
    private readonly specifications: SpecificationsService,
    private readonly passwords: PasswordChecks,
  ) {}

  @Get('plants/:id/set-up/specifications')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<SpecificationSetUpView>> {
    return this.specifications.list(person, plantId);
  }

  @Post('plants/:id/set-up/specification-proposals')
  @Permit('propose_specification')
  propose(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: SpecificationProposalDto,
  ): Promise<SpecificationSetUpView> {
    return this.specifications.propose(person, plantId, body);
  }

  @Post('specification-proposals/:id/approval')
  @Permit('approve_specification')
  @HttpCode(200)
  async approve(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: SpecificationApprovalDto,
    @Ip() address: string,
  ): Promise<SpecificationSetUpView> {
    await this.specifications.requireApprovable(person, id);
    await this.passwords.verifyPassword(person.id, body.password, address);
    return this.specifications.approve(person, id);
  }

  @Post('specification-proposals/:id/withdrawal')
  @Permit('propose_specification')
  @HttpCode(200)
  withdraw(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<SpecificationSetUpView> {
    return this.specifications.withdraw(person, id);
  }
}
