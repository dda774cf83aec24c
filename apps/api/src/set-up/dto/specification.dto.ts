import { applyDecorators } from '@nestjs/common';
import { ApiProperty } from '@nestjs/swagger';
import { IsBoolean, IsNotEmpty, IsNumber, IsString, MaxLength, ValidateIf } from 'class-validator';
import { IdField, InstantField, TextField } from './fields';

const LimitField = (which: string) =>
  applyDecorators(
    ApiProperty({ type: 'number', nullable: true }),
    ValidateIf((_body, value) => value !== null),
    IsNumber({}, { message: `Give the ${which} specification limit as a number, or leave it empty.` }),
  );

export class SpecificationProposalDto {
  @IdField('Say for which product it is.')
  productId!: number;

  @IdField('Say for which characteristic it is.')
  characteristicId!: number;

  @ApiProperty()
  @IsNumber({}, { message: 'Give the nominal value as a number.' })
  nominal!: number;

  @LimitField('lower')
  lower!: number | null;

  @LimitField('upper')
  upper!: number | null;

  @ApiProperty()
  @IsBoolean({ message: 'Say whether every reading is compared with the limits, or the lot mean alone.' })
  appliesToIndividuals!: boolean;

  @InstantField()
  validFrom!: string;

  @TextField('Say why: the reason stands on the record.', { max: 500 })
  reason!: string;
}

export class SpecificationApprovalDto {
  @ApiProperty({ description: 'The approver’s own password, given again as part of the signature.' })
  @IsString()
  @IsNotEmpty({ message: 'Give your password again to sign.' })
  @MaxLength(1024)
  password!: string;
}
