import { Controller, Get, Param, Query, Res, StreamableFile } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { LotListItem, LotView, Page } from '@app/contracts';
import type { Response } from 'express';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { LotsQuery } from './dto/lots-query.dto';
import { LotsService } from './lots.service';
import { LotsTableService } from './lots-table.service';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

@ApiTags('lots')
@Controller('lots')
export class LotsController {
  constructor(
    private readonly lots: LotsService,
    private readonly table: LotsTableService,
  ) {}

  @Get()
  @Permit('read')
  async list(
    @CurrentPerson() person: Person,
    @Query() query: LotsQuery,
    @Res({ passthrough: true }) response: Response,
  ): Promise<Page<LotListItem> | StreamableFile> {
    if (query.format !== 'xlsx') return this.lots.list(person, query);
    const bytes = await this.table.write(person, query);
    response.attachment('lots.xlsx');
    return new StreamableFile(bytes, { type: XLSX, length: bytes.length });
  }

  @Get(':id')
  @Permit('read')
  find(@CurrentPerson() person: Person, @Param('id', IdPipe) id: number): Promise<LotView> {
    return this.lots.find(person, id);
  }
}
