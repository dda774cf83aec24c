import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { IsBoolean, IsOptional, IsString, Matches } from 'class-validator';

export class SummaryRequestDto {
  @ApiProperty({ description: 'The Monday of a complete week, by the plant’s calendar.', example: '2026-03-02' })
  @IsString()
  @Matches(/^\d{4}-\d{2}-\d{2}$/, { message: 'Give the date of a Monday as YYYY-MM-DD.' })
  weekStartsOn!: string;

  @ApiPropertyOptional({ description: 'Whether it is mailed to whoever gets summaries.', default: false })
  @IsOptional()
  @IsBoolean()
  send?: boolean;
}
