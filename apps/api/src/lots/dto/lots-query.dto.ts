import { ApiPropertyOptional } from '@nestjs/swagger';
import { type Disposition, DISPOSITIONS } from '@app/contracts';
import { HELD_FILTERS, LOT_SORTS, LOT_STATE_FILTERS, LOT_TIMES } from '@app/data';
import { Type } from 'class-transformer';
import { IsIn, IsInt, IsISO8601, IsOptional, IsString, Matches, Max, MaxLength, Min } from 'class-validator';
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

  @ApiPropertyOptional({ description: 'what from and to speak of; open: on hold and undecided at to', enum: LOT_TIMES })
  @IsOptional()
  @IsIn(LOT_TIMES)
  by?: (typeof LOT_TIMES)[number];

  @ApiPropertyOptional({ description: 'lots that start (or what by says) at or after this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  from?: string;

  @ApiPropertyOptional({ description: 'lots that start (or what by says) before this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  to?: string;

  @ApiPropertyOptional({
    description: 'decided so in whole or in part; with by=decided in that time',
    enum: DISPOSITIONS,
  })
  @IsOptional()
  @IsIn(DISPOSITIONS)
  disposition?: Disposition;

  @ApiPropertyOptional({ description: 'a channel on which the lot was measured and has no score' })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(Number.MAX_SAFE_INTEGER)
  notScoredOn?: number;

  @ApiPropertyOptional({ description: 'with notScoredOn: why it has none there', example: 'learning' })
  @IsOptional()
  @IsString()
  @Matches(/^[a-z_]{1,60}$/, { message: 'Give the reason as its code, such as learning.' })
  notScoredFor?: string;

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
