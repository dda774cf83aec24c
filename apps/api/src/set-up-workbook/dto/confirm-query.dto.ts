import { ApiPropertyOptional } from '@nestjs/swagger';
import { IsIn, IsOptional } from 'class-validator';

export class ConfirmQueryDto {
  /** no: say what would happen. yes: apply the workbook as a whole. */
  @ApiPropertyOptional({ enum: ['no', 'yes'], default: 'no' })
  @IsOptional()
  @IsIn(['no', 'yes'], { message: 'Say yes to apply the workbook, or no to see what would happen.' })
  confirm?: 'no' | 'yes';
}
