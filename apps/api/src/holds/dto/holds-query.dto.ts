import { ApiPropertyOptional } from '@nestjs/swagger';
import { HOLD_STATES, type HoldState } from '@app/contracts';
import { IsIn, IsOptional } from 'class-validator';
import { PlaceQuery } from '../../platform/place-query';

export class HoldsQuery extends PlaceQuery {
  @ApiPropertyOptional({ enum: HOLD_STATES })
  @IsOptional()
  @IsIn(HOLD_STATES)
  status?: HoldState;
}
