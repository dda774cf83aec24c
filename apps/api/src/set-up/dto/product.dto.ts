import { PositiveField, RetiredField, TextField } from './fields';

const CODE = 'Give the code that workbooks have for the product, such as SEP-16.';
const NAME = 'Name the product.';
const VALUE = 'Give what one unit of a lot is worth, above 0, or leave it empty.';

export class NewProductDto {
  @TextField(CODE)
  code!: string;

  @TextField(NAME)
  name!: string;

  @PositiveField(VALUE, { isOptional: true, isNullable: true })
  valuePerUnit?: number | null;
}

export class ProductDto {
  @TextField(CODE, { isOptional: true })
  code?: string;

  @TextField(NAME, { isOptional: true })
  name?: string;

  @PositiveField(VALUE, { isOptional: true, isNullable: true })
  valuePerUnit?: number | null;

  @RetiredField()
  isRetired?: boolean;
}
