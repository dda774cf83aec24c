import { Body, Controller, Get, HttpCode, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { ChannelSetUpView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { ChannelDto, ChannelGaugeDto, NewChannelDto } from './dto/channel.dto';
import { SetUpChannelsService } from './channels.service';

@ApiTags('set-up')
@Controller()
export class SetUpChannelsController {
  constructor(private readonly channels: SetUpChannelsService) {}

  @Get('plants/:id/set-up/channels')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<ChannelSetUpView>> {
    return this.channels.list(person, plantId);
  }

  @Post('plants/:id/set-up/channels')
  @Permit('set_up_plant')
  add(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: NewChannelDto,
  ): Promise<ChannelSetUpView> {
    return this.channels.add(person, plantId, body);
  }

  @Patch('channels/:id')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: ChannelDto,
  ): Promise<ChannelSetUpView> {
    return this.channels.change(person, id, body);
  }

  /** Another gauge serves from an instant on; with readings there, the baseline starts afresh then. */
  @Post('channels/:id/gauges')
  @Permit('set_up_plant')
  @HttpCode(200)
  changeGauge(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: ChannelGaugeDto,
  ): Promise<ChannelSetUpView> {
    return this.channels.changeGauge(person, id, body);
  }
}
