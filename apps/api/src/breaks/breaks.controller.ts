import { Body, Controller, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { BreakView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { BreaksService } from './breaks.service';
import { BreakDto } from './dto/break.dto';

@ApiTags('channels')
@Controller('channels')
export class BreaksController {
  constructor(private readonly breaks: BreaksService) {}

  @Post(':id/breaks')
  @Permit('declare_break')
  declare(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: BreakDto,
  ): Promise<BreakView> {
    return this.breaks.declare(person, id, body);
  }
}
