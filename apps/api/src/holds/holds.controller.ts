import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { HoldListItem, HoldView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { HoldsQuery } from './dto/holds-query.dto';
import { HoldsService } from './holds.service';

@ApiTags('holds')
@Controller('holds')
export class HoldsController {
  constructor(private readonly holds: HoldsService) {}

  @Get()
  @Permit('read')
  list(@CurrentPerson() person: Person, @Query() query: HoldsQuery): Promise<Page<HoldListItem>> {
    return this.holds.list(person, query);
  }

  @Get(':id')
  @Permit('read')
  find(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<HoldView> {
    return this.holds.find(person, id);
  }
}
