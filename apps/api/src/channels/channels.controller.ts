import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { ChannelView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { ChannelRecordService, type RecordAnswer } from './channel-record.service';
import { ChannelsService } from './channels.service';
import { RecordQuery } from './dto/record-query.dto';

@ApiTags('channels')
@Controller()
export class ChannelsController {
  constructor(
    private readonly channels: ChannelsService,
    private readonly records: ChannelRecordService,
  ) {}

  @Get('lines/:id/channels')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<Page<ChannelView>> {
    return this.channels.list(person, id);
  }

  @Get('channels/:id')
  @Permit('read')
  find(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<ChannelView> {
    return this.channels.find(person, id);
  }

  @Get('channels/:id/record')
  @Permit('read')
  record(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Query() query: RecordQuery,
  ): Promise<RecordAnswer> {
    return this.records.read(person, id, query);
  }
}
