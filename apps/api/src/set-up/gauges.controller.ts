import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { GaugeSetUpView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { GaugeDto, NewGaugeDto } from './dto/gauge.dto';
import { SetUpGaugesService } from './gauges.service';

@ApiTags('set-up')
@Controller()
export class SetUpGaugesController {
  constructor(private readonly gauges: SetUpGaugesService) {}

  @Get('plants/:id/set-up/gauges')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<GaugeSetUpView>> {
    return this.gauges.list(person, plantId);
  }

  @Post('plants/:id/set-up/gauges')
  @Permit('set_up_plant')
  add(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: NewGaugeDto,
  ): Promise<GaugeSetUpView> {
    return this.gauges.add(person, plantId, body);
  }

  @Patch('gauges/:id')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: GaugeDto,
  ): Promise<GaugeSetUpView> {
    return this.gauges.change(person, id, body);
  }
}
