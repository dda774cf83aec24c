import { ApiPropertyOptional } from '@nestjs/swagger';
import { HOLD_STATES, type HoldState } from '@app/contracts';
import { Type } from 'class-transformer';
import { IsIn, IsInt, IsOptional, Max, Min } from 'class-validator';
import { PageQuery } from '../../platform/paging';

export class HoldsQuery extends PageQuery {
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

  @ApiPropertyOptional({ enum: HOLD_STATES })
  @IsOptional()
  @IsIn(HOLD_STATES)
  status?: HoldState;
}
