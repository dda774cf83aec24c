import { Body, Controller, Get, Param, Put } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { ShiftCalendarsView } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { ShiftCalendarDto } from './dto/shifts.dto';
import { SetUpShiftsService } from './shifts.service';

@ApiTags('set-up')
@Controller('plants/:id/set-up/shifts')
export class SetUpShiftsController {
  constructor(private readonly shifts: SetUpShiftsService) {}

  @Get()
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<ShiftCalendarsView> {
    return this.shifts.list(person, plantId);
  }

  @Put()
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: ShiftCalendarDto,
  ): Promise<ShiftCalendarsView> {
    return this.shifts.change(person, plantId, body);
  }
}
