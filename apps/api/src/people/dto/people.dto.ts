import { applyDecorators } from '@nestjs/common';
import { ApiProperty } from '@nestjs/swagger';
import { type Role, ROLES } from '@app/contracts';
import { Transform } from 'class-transformer';
import {
  ArrayMaxSize,
  ArrayMinSize,
  ArrayUnique,
  IsArray,
  IsEmail,
  IsIn,
  IsInt,
  IsNotEmpty,
  IsString,
  MaxLength,
  Min,
} from 'class-validator';

const trimmed = ({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value);

// Decorators rather than a base class: what a subclass says of a property takes the place of all that its parent says.
const SomeRoles = () =>
  applyDecorators(
    ApiProperty({ enum: ROLES, isArray: true }),
    IsArray(),
    ArrayMaxSize(ROLES.length),
    ArrayUnique(),
    IsIn(ROLES, { each: true, message: 'Choose from the roles that there are.' }),
  );

const SomeLines = () =>
  applyDecorators(
    ApiProperty({ type: [Number] }),
    IsArray(),
    ArrayMaxSize(500),
    ArrayUnique(),
    IsInt({ each: true, message: 'Choose from the lines of the plant.' }),
    Min(1, { each: true, message: 'Choose from the lines of the plant.' }),
  );

export class RolesDto {
  @SomeRoles()
  roles!: Role[];

  @SomeLines()
  lineIds!: number[];
}

export class InvitationDto {
  @ApiProperty()
  @Transform(trimmed)
  @IsEmail({ require_tld: false }, { message: 'Enter an e-mail address, such as name@plant.example.' })
  @MaxLength(254)
  email!: string;

  @ApiProperty()
  @Transform(trimmed)
  @IsString()
  @IsNotEmpty({ message: 'Enter the person’s name: it stands under what they sign.' })
  @MaxLength(120)
  name!: string;

  @SomeRoles()
  @ArrayMinSize(1, { message: 'Choose at least one role.' })
  roles!: Role[];

  @SomeLines()
  lineIds!: number[];
}
