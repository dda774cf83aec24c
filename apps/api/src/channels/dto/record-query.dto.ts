import { ApiPropertyOptional } from '@nestjs/swagger';
import { Type } from 'class-transformer';
import { IsInt, IsOptional, Max, Min } from 'class-validator';

/** 1 January 2200: no record goes farther. */
const LATEST = 7_258_118_400_000;

/** A stretch of a record, epoch milliseconds; default is the last fourteen days of readings. */
export class RecordQuery {
  @ApiPropertyOptional({ description: 'epoch milliseconds' })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(0)
  @Max(LATEST)
  from?: number;

  @ApiPropertyOptional({ description: 'epoch milliseconds' })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(0)
  @Max(LATEST)
  to?: number;

  @ApiPropertyOptional({ description: 'columns of pixels', minimum: 1, maximum: 4000 })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(4000)
  width: number = 1000;
}
