import { ApiPropertyOptional } from '@nestjs/swagger';
import { HELD_FILTERS, LOT_SORTS, LOT_STATE_FILTERS } from '@app/data';
import { IsIn, IsISO8601, IsOptional, IsString, MaxLength } from 'class-validator';
import { PlaceQuery } from '../../platform/place-query';

export class LotsQuery extends PlaceQuery {
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
