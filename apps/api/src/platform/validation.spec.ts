import { Type } from 'class-transformer';
import { IsInt, Min, ValidateNested } from 'class-validator';
import { DomainError } from '@app/contracts';
import { createValidationPipe } from './validation';

class Part {
  @IsInt()
  @Min(1)
  quantity!: number;
}

class Order {
  @ValidateNested({ each: true })
  @Type(() => Part)
  parts!: Part[];
}

async function refusal(body: object): Promise<DomainError> {
  try {
    await createValidationPipe().transform(body, { type: 'body', metatype: Order });
  } catch (error) {
    return error as DomainError;
  }
  throw new Error('the body was taken');
}

describe('input that fails its class', () => {
  it('is told with a JSON pointer to each field, however deep', async () => {
    const error = await refusal({ parts: [{ quantity: 1 }, { quantity: 0 }] });
    expect(error).toBeInstanceOf(DomainError);
    expect([error.kind, error.code]).toEqual(['invalid', 'invalid-input']);
    expect(error.fields).toEqual([
      { pointer: '/parts/1/quantity', code: 'min', detail: 'Quantity must not be less than 1.' },
    ]);
  });

  it('names fields that nobody knows, with the characters that pointers escape', async () => {
    const error = await refusal({ parts: [], 'a/b~c': 1 });
    expect(error.fields).toEqual([
      { pointer: '/a~1b~0c', code: 'unknown-field', detail: expect.stringContaining('should not exist') },
    ]);
  });

  it('that passes comes as an instance of the class', async () => {
    const order: unknown = await createValidationPipe().transform(
      { parts: [{ quantity: 2 }] },
      { type: 'body', metatype: Order },
    );
    expect(order).toBeInstanceOf(Order);
    expect((order as Order).parts[0]).toBeInstanceOf(Part);
  });
});
