import { ApiPropertyOptional } from '@nestjs/swagger';
import { HELD_FILTERS, LOT_SORTS, LOT_STATE_FILTERS } from '@app/data';
import { Type } from 'class-transformer';
import { IsIn, IsInt, IsISO8601, IsOptional, IsString, Max, MaxLength, Min } from 'class-validator';
import { PageQuery } from '../../platform/paging';

export class LotsQuery extends PageQuery {
  @ApiPropertyOptional()
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(Number.MAX_SAFE_INTEGER)
  plantId?: number;

  @ApiPropertyOptional()
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(Number.MAX_SAFE_INTEGER)
  lineId?: number;

  @ApiPropertyOptional({ enum: LOT_STATE_FILTERS })
  @IsOptional()
  @IsIn(LOT_STATE_FILTERS)
  state?: (typeof LOT_STATE_FILTERS)[number];

  @ApiPropertyOptional({ enum: HELD_FILTERS })
  @IsOptional()
  @IsIn(HELD_FILTERS)
  held?: (typeof HELD_FILTERS)[number];

  @ApiPropertyOptional({ description: 'lots that start at or after this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  from?: string;

  @ApiPropertyOptional({ description: 'lots that start before this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  to?: string;

  @ApiPropertyOptional({ description: "part of the lot's number or its product's code or name" })
  @IsOptional()
  @IsString()
  @MaxLength(100)
  text?: string;

  @ApiPropertyOptional({ enum: LOT_SORTS })
  @IsOptional()
  @IsIn(LOT_SORTS)
  sort: (typeof LOT_SORTS)[number] = '-startsAt';

  @ApiPropertyOptional({ enum: ['json', 'xlsx'] })
  @IsOptional()
  @IsIn(['json', 'xlsx'])
  format?: 'json' | 'xlsx';
}
