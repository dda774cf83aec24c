import { Body, Controller, Get, HttpCode, Ip, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { Page, PlanView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { PasswordChecks } from '../auth/password-checks.service';
import { IdPipe } from '../platform/id.pipe';
import { ApprovePlanDto, ProposePlanDto } from './dto/plan.dto';
import { PlansService } from './plans.service';

@ApiTags('plans')
@Controller()
export class PlansController {
  constructor(
    private readonly plans: PlansService,
    private readonly passwords: PasswordChecks,
  ) {}

  @Get('channels/:id/plans')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) channelId: number): Promise<Page<PlanView>> {
    return this.plans.list(person, channelId);
  }

  /** The draft is worked out by a worker: 202, then read it again. */
  @Post('channels/:id/plans')
  @Permit('propose_plan')
  @HttpCode(202)
  propose(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) channelId: number,
    @Body() body: ProposePlanDto,
  ): Promise<PlanView> {
    return this.plans.propose(person, channelId, { reason: body.reason, isRobust: body.isRobust ?? false });
  }

  @Get('plans/:id')
  @Permit('read')
  get(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<PlanView> {
    return this.plans.get(person, id);
  }

  @Post('plans/:id/approval')
  @Permit('approve_plan')
  @HttpCode(200)
  async approve(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: ApprovePlanDto,
    @Ip() address: string,
  ): Promise<PlanView> {
    await this.plans.requireApprovable(person, id);
    await this.passwords.verifyPassword(person.id, body.password, address);
    return this.plans.approve(person, id);
  }
}
