import { ApiProperty } from '@nestjs/swagger';
import { Type } from 'class-transformer';
import { ArrayMaxSize, ArrayMinSize, IsArray, IsISO8601, Matches, ValidateNested } from 'class-validator';
import { TextField } from './fields';

const TIME = /^([01]\d|2[0-3]):[0-5]\d$/;
const TIME_MESSAGE = 'Give a time of day from 00:00 to 23:59, such as 06:00.';

export class ShiftSpanDto {
  @TextField('Name the shift, such as early.')
  name!: string;

  @ApiProperty({ example: '06:00' })
  @Matches(TIME, { message: TIME_MESSAGE })
  startsAt!: string;

  @ApiProperty({ example: '14:00' })
  @Matches(TIME, { message: TIME_MESSAGE })
  endsAt!: string;
}

export class ShiftCalendarDto {
  @ApiProperty({ format: 'date', example: '2026-03-02' })
  @Matches(/^\d{4}-\d{2}-\d{2}$/, { message: 'Give the first day of the calendar, such as 2026-03-02.' })
  @IsISO8601({ strict: true }, { message: 'There is no such day.' })
  validFrom!: string;

  @ApiProperty({ type: [ShiftSpanDto] })
  @IsArray({ message: 'Give the shifts of a day.' })
  @ArrayMinSize(1, { message: 'Give at least one shift.' })
  @ArrayMaxSize(24, { message: 'Give 24 shifts at most.' })
  @ValidateNested({ each: true })
  @Type(() => ShiftSpanDto)
  shifts!: ShiftSpanDto[];
}
