import { PositiveField, RetiredField, TextField } from './fields';

const NAME = 'Name the characteristic, such as coat weight.';
const UNIT = 'Give its unit, such as g/m², or leave it empty when it has none, as pH.';
const RESOLUTION = 'Give the smallest step of an indication, above 0, such as 0.01.';

export class NewCharacteristicDto {
  @TextField(NAME)
  name!: string;

  @TextField(UNIT, { max: 20, mayBeEmpty: true })
  unit!: string;

  @PositiveField(RESOLUTION)
  resolution!: number;
}

export class CharacteristicDto {
  @TextField(NAME, { isOptional: true })
  name?: string;

  @TextField(UNIT, { max: 20, isOptional: true, mayBeEmpty: true })
  unit?: string;

  @PositiveField(RESOLUTION, { isOptional: true })
  resolution?: number;

  @RetiredField()
  isRetired?: boolean;
}
