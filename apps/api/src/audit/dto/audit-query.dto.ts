import { ApiPropertyOptional } from '@nestjs/swagger';
import { Type } from 'class-transformer';
import { IsInt, IsISO8601, IsOptional, IsString, Max, MaxLength, Min } from 'class-validator';
import { PageQuery } from '../../platform/paging';

export class AuditQuery extends PageQuery {
  @ApiPropertyOptional({ description: 'number of the person who acted; 0: what Ebbline did by itself' })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(0)
  @Max(Number.MAX_SAFE_INTEGER)
  person?: number;

  @ApiPropertyOptional({ description: 'kind of thing, such as hold' })
  @IsOptional()
  @IsString()
  @MaxLength(50)
  kind?: string;

  @ApiPropertyOptional({ description: 'number of the thing; with a kind only' })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(Number.MAX_SAFE_INTEGER)
  thing?: number;

  @ApiPropertyOptional({ description: 'what was done, such as release' })
  @IsOptional()
  @IsString()
  @MaxLength(50)
  action?: string;

  @ApiPropertyOptional({ description: 'entries at or after this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  from?: string;

  @ApiPropertyOptional({ description: 'entries before this instant' })
  @IsOptional()
  @IsISO8601({ strict: true })
  to?: string;

  @ApiPropertyOptional({ description: 'part of the sentence' })
  @IsOptional()
  @IsString()
  @MaxLength(100)
  text?: string;
}
