import { Module } from '@nestjs/common';
import { ChannelRecordService } from './channel-record.service';
import { ChannelsController } from './channels.controller';
import { ChannelsService } from './channels.service';

@Module({ controllers: [ChannelsController], providers: [ChannelsService, ChannelRecordService] })
export class ChannelsModule {}
