import { applyDecorators } from '@nestjs/common';
import { ApiProperty, ApiPropertyOptional } from '@nestjs/swagger';
import { Transform } from 'class-transformer';
import {
  IsBoolean,
  IsInt,
  IsISO8601,
  IsNotEmpty,
  IsNumber,
  IsOptional,
  IsPositive,
  IsString,
  Max,
  MaxLength,
  ValidateIf,
} from 'class-validator';

const trimmed = ({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value);

/** A field that may be left out, but is not null. */
export const WhenGiven = () => ValidateIf((_body, value) => value !== undefined);

/** Text, not empty unless it may be; `missing` says what to write there. */
export const TextField = (missing: string, { max = 100, isOptional = false, mayBeEmpty = false } = {}) =>
  applyDecorators(
    isOptional ? ApiPropertyOptional({ maxLength: max }) : ApiProperty({ maxLength: max }),
    ...(isOptional ? [WhenGiven()] : []),
    Transform(trimmed),
    IsString({ message: missing }),
    ...(mayBeEmpty ? [] : [IsNotEmpty({ message: missing })]),
    MaxLength(max, { message: `Use ${max} characters at most.` }),
  );

export const IdField = (missing: string) =>
  applyDecorators(
    ApiProperty({ type: 'integer' }),
    IsInt({ message: missing }),
    IsPositive({ message: missing }),
    Max(Number.MAX_SAFE_INTEGER, { message: missing }),
  );

export const InstantField = () =>
  applyDecorators(
    ApiProperty({ format: 'date-time' }),
    IsISO8601(
      { strict: true, strictSeparator: true },
      { message: 'Give date and time, such as 2026-03-02T06:00:00Z.' },
    ),
  );

/** A number above 0; with `isNullable` none may be stated. */
export const PositiveField = (message: string, { isOptional = false, isNullable = false } = {}) =>
  applyDecorators(
    isOptional
      ? ApiPropertyOptional({ type: 'number', nullable: isNullable })
      : ApiProperty({ type: 'number', nullable: isNullable }),
    ...(isNullable ? [IsOptional()] : isOptional ? [WhenGiven()] : []),
    IsNumber({}, { message }),
    IsPositive({ message }),
    Max(1e12, { message: 'Give a smaller number.' }),
  );

export const RetiredField = () =>
  applyDecorators(
    ApiPropertyOptional({ description: 'True retires, false brings back into use.' }),
    WhenGiven(),
    IsBoolean({ message: 'Say true to retire it, or false to bring it back into use.' }),
  );
