import { ApiProperty } from '@nestjs/swagger';
import { BREAK_KINDS, type BreakKind } from '@app/contracts';
import { Transform } from 'class-transformer';
import { IsIn, IsISO8601, IsNotEmpty, IsString, MaxLength } from 'class-validator';

export class BreakDto {
  @ApiProperty({ format: 'date-time' })
  @IsISO8601({ strict: true }, { message: 'Give date and time, such as 2026-03-02T06:00:00Z.' })
  at!: string;

  @ApiProperty({ enum: BREAK_KINDS })
  @IsIn(BREAK_KINDS, { message: 'Say whether it was an adjustment, a gauge change or a process change.' })
  kind!: BreakKind;

  @ApiProperty()
  @Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value))
  @IsString()
  @IsNotEmpty({ message: 'Say what was done: the reason stands on the record.' })
  @MaxLength(500)
  reason!: string;
}
