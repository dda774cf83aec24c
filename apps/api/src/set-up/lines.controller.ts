import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { LineSetUpView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { LineDto, NewLineDto } from './dto/line.dto';
import { SetUpLinesService } from './lines.service';

@ApiTags('set-up')
@Controller()
export class SetUpLinesController {
  constructor(private readonly lines: SetUpLinesService) {}

  @Get('plants/:id/set-up/lines')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<LineSetUpView>> {
    return this.lines.list(person, plantId);
  }

  @Post('plants/:id/set-up/lines')
  @Permit('set_up_plant')
  add(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: NewLineDto,
  ): Promise<LineSetUpView> {
    return this.lines.add(person, plantId, body);
  }

  @Patch('lines/:id')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: LineDto,
  ): Promise<LineSetUpView> {
    return this.lines.change(person, id, body);
  }
}
