import { ApiPropertyOptional } from '@nestjs/swagger';
import type { Page } from '@app/contracts';
import { Type } from 'class-transformer';
import { IsInt, IsOptional, Max, Min } from 'class-validator';

const PAGE_SIZE = 50;

/** What every list that comes in pages takes. */
export class PageQuery {
  @ApiPropertyOptional({ minimum: 1 })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(1_000_000)
  page: number = 1;

  @ApiPropertyOptional({ minimum: 1, maximum: 200 })
  @IsOptional()
  @Type(() => Number)
  @IsInt()
  @Min(1)
  @Max(200)
  pageSize: number = PAGE_SIZE;
}

export const limitsOf = ({ page, pageSize }: PageQuery) => ({ limit: pageSize, offset: (page - 1) * pageSize });

/** A list that is always whole, in the shape of all lists. */
export const onePage = <T>(items: T[]): Page<T> => ({ items, total: items.length, page: 1, pageSize: items.length });
