import { ApiPropertyOptional } from '@nestjs/swagger';
import { IsBoolean, IsNumber, IsOptional, IsPositive, Matches, Max } from 'class-validator';
import { TextField, WhenGiven } from './fields';

const NAME = 'Name the plant.';
const ZONE = 'Give the plant’s time zone by its IANA name, such as Europe/London.';
const CURRENCY = 'Give the currency by its three letters, such as EUR, or leave it empty.';
const HOURS = 'Give a number of hours above 0.';
const SHARE = 'Give a share of the tolerance above 0, such as 0.1 for 10 %.';

export class NewPlantDto {
  @TextField(NAME)
  name!: string;

  @TextField(ZONE)
  timeZone!: string;

  @ApiPropertyOptional({ type: 'string', nullable: true })
  @IsOptional()
  @Matches(/^[A-Z]{3}$/, { message: CURRENCY })
  currency?: string | null;
}

export class PlantSetUpDto {
  @TextField(NAME, { isOptional: true })
  name?: string;

  @TextField(ZONE, { isOptional: true })
  timeZone?: string;

  @ApiPropertyOptional({ type: 'string', nullable: true })
  @IsOptional()
  @Matches(/^[A-Z]{3}$/, { message: CURRENCY })
  currency?: string | null;

  @ApiPropertyOptional()
  @WhenGiven()
  @IsBoolean({ message: 'Say whether engineers may release lots held for control limits alone.' })
  engineerMayRelease?: boolean;

  @ApiPropertyOptional({ description: 'h' })
  @WhenGiven()
  @IsNumber({}, { message: HOURS })
  @IsPositive({ message: HOURS })
  @Max(8_760, { message: 'Give a year of hours at most: 8760.' })
  reminderManagerHours?: number;

  @ApiPropertyOptional({ description: 'h' })
  @WhenGiven()
  @IsNumber({}, { message: HOURS })
  @IsPositive({ message: HOURS })
  @Max(8_760, { message: 'Give a year of hours at most: 8760.' })
  reminderDirectorHours?: number;

  @ApiPropertyOptional({ description: 'Share of the tolerance' })
  @WhenGiven()
  @IsNumber({}, { message: SHARE })
  @IsPositive({ message: SHARE })
  @Max(1, { message: 'Give 1 at most: the whole tolerance.' })
  allowanceNoticeShare?: number;

  @ApiPropertyOptional({ description: 'Share of the tolerance' })
  @WhenGiven()
  @IsNumber({}, { message: SHARE })
  @IsPositive({ message: SHARE })
  @Max(1, { message: 'Give 1 at most: the whole tolerance.' })
  allowanceCapShare?: number;
}
