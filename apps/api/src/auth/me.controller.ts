import { Controller, Get } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { Me } from '@app/contracts';
import { Permit } from '../access/permit';
import { AuthService } from './auth.service';
import { CurrentPerson, type Person } from './current-person';

@ApiTags('sign-in')
@Controller('me')
export class MeController {
  constructor(private readonly auth: AuthService) {}

  @Get()
  @Permit('read')
  me(@CurrentPerson() person: Person): Promise<Me> {
    return this.auth.me(person);
  }
}
