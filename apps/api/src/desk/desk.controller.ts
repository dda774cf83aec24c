import { Controller, Get, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { DeskView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { DeskService } from './desk.service';
import { DeskQuery } from './dto/desk-query.dto';

@ApiTags('desk')
@Controller('desk')
export class DeskController {
  constructor(private readonly desk: DeskService) {}

  @Get()
  @Permit('read')
  read(@CurrentPerson() person: Person, @Query() query: DeskQuery): Promise<DeskView> {
    return this.desk.read(person, query.plantId);
  }
}
