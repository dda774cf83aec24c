import { Body, Controller, HttpCode, Ip, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { PasswordChecks } from '../auth/password-checks.service';
import { IdPipe } from '../platform/id.pipe';
import { DecisionsService } from './decisions.service';
import { DecisionDto, SetAsideDto } from './dto/decision.dto';

@ApiTags('holds')
@Controller('holds')
export class DecisionsController {
  constructor(
    private readonly decisions: DecisionsService,
    private readonly passwords: PasswordChecks,
  ) {}

  @Post(':id/set-aside')
  @Permit('set_aside')
  @HttpCode(204)
  setAside(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number, @Body() body: SetAsideDto): Promise<void> {
    return this.decisions.setAside(person, id, body.place || null);
  }

  /** The right is looked at before the password, so that nobody is asked to sign what they may not. */
  @Post(':id/decision')
  @Permit('release_for_control_limits')
  @HttpCode(204)
  async decide(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: DecisionDto,
    @Ip() address: string,
  ): Promise<void> {
    await this.decisions.requireRight(person, id, body);
    await this.passwords.verifyPassword(person.id, body.password, address);
    await this.decisions.decide(person, id, body);
  }
}
