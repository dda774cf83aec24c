import { Body, Controller, Get, HttpCode, Ip, Param, Post, Res, StreamableFile } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { SummaryListView, SummaryRequested, SummaryView } from '@app/contracts';
import type { Response } from 'express';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { SummaryRequestDto } from './dto/summary.dto';
import { SummariesService } from './summaries.service';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('summaries')
@Controller()
export class SummariesController {
  constructor(private readonly summaries: SummariesService) {}

  @Get('plants/:id/summaries')
  @Permit('read_summary')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<SummaryListView> {
    return this.summaries.list(person, plantId);
  }

  /** A worker makes the version: 202, then read the list until the week has it. */
  @Post('plants/:id/summaries')
  @Permit('send_summary')
  @HttpCode(202)
  request(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: SummaryRequestDto,
    @Ip() address: string,
  ): Promise<SummaryRequested> {
    return this.summaries.request(
      person,
      plantId,
      { weekStartsOn: body.weekStartsOn, send: body.send ?? false },
      address,
    );
  }

  @Get('summaries/:id')
  @Permit('read_summary')
  get(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<SummaryView> {
    return this.summaries.get(person, id);
  }

  @Get('summaries/:id/workbook')
  @Permit('read_summary')
  async workbook(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { name, bytes } = await this.summaries.workbook(person, id);
    response.attachment(name);
    return new StreamableFile(bytes, { type: XLSX, length: bytes.length });
  }
}
