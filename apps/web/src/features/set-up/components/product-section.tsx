import type { NewProductBody, ProductSetUpView } from '@app/contracts';
import { useSession } from '../../../shared/session/session';
import type { FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { usePlantSetUp, useProducts } from '../api/set-up';
import { useSend, type Send } from '../api/use-send';
import { changedFields } from '../changed';
import { numberText, readNumber } from '../typed-values';
import { InlineForm, type FieldSpec } from './inline-form';
import { retiring } from './retiring';
import { RowTable, type RowAction } from './row-table';

type Typed = { code: string; name: string; valuePerUnit: string };

const fieldsOf = (currency: string | null): FieldSpec<Typed>[] => [
  {
    name: 'code',
    label: 'Code',
    hint: 'As workbooks write it.',
    size: 'short',
    missing: 'Give the product’s code.',
  },
  { name: 'name', label: 'Name', missing: 'Give the product’s name.' },
  {
    name: 'valuePerUnit',
    label: `Value of one unit${currency === null ? '' : `, ${currency}`}`,
    hint: currency === null ? 'The plant states no currency yet.' : 'Of a lot’s quantity; may be empty.',
    kind: 'number',
  },
];

const bodyOf = (typed: Typed) => ({
  code: typed.code.trim(),
  name: typed.name.trim(),
  valuePerUnit: readNumber(typed.valuePerUnit),
});
const typedOf = ({ code, name, valuePerUnit }: ProductSetUpView): Typed => ({
  code,
  name,
  valuePerUnit: numberText(valuePerUnit),
});

const columnsOf = (currency: string | null): FoldingColumn<ProductSetUpView>[] => [
  { name: 'Code', isLead: true, cell: ({ code, isRetired }) => (isRetired ? `${code}, retired` : code) },
  { name: 'Name', cell: ({ name }) => name },
  {
    name: `Value of one unit${currency === null ? '' : `, ${currency}`}`,
    isNumber: true,
    cell: ({ valuePerUnit }) => valuePerUnit ?? 'not stated',
  },
];

export function ProductSection({ plantId }: { plantId: number }) {
  const { can } = useSession();
  const send = useSend(plantId);
  const query = useProducts(plantId);
  const currency = usePlantSetUp(plantId).data?.currency ?? null;
  const isMine = can('set_up_plant');
  const fields = fieldsOf(currency);
  const add = async (typed: Typed, onDone: () => void) => {
    await send('POST', `/plants/${plantId}/set-up/products`, bodyOf(typed) satisfies NewProductBody);
    onDone();
  };
  return (
    <Sheet
      title="Products"
      isFlush
      margin={<p>What a unit is worth lets the weekly summary say what the held quantity costs.</p>}
    >
      <Loaded query={query} failure="The products could not be loaded.">
        {(products) => (
          <RowTable
            caption="Products"
            columns={columnsOf(currency)}
            items={products}
            keyOf={(product) => product.id}
            isSoft={(product) => product.isRetired}
            empty="No product yet. Each lot of a workbook names one by its code; an administrator adds them here."
            actionsOf={isMine ? (product) => actionsOf(product, fields, send) : undefined}
            add={
              isMine
                ? {
                    words: 'Add a product',
                    form: (onDone) => (
                      <InlineForm
                        fields={fields}
                        values={{ code: '', name: '', valuePerUnit: '' }}
                        sends="Add the product"
                        send={(typed) => add(typed, onDone)}
                        onLeave={onDone}
                      />
                    ),
                  }
                : undefined
            }
          />
        )}
      </Loaded>
    </Sheet>
  );
}

function actionsOf(product: ProductSetUpView, fields: FieldSpec<Typed>[], send: Send): RowAction[] {
  const path = `/products/${product.id}`;
  const before = typedOf(product);
  const change: RowAction = {
    words: 'Change',
    label: `Change ${product.code}`,
    panel: (onDone) => (
      <InlineForm
        fields={fields}
        values={before}
        sends={`Change ${product.code}`}
        onLeave={onDone}
        send={async (typed) => {
          const changes = changedFields(bodyOf(before), bodyOf(typed));
          if (changes !== null) await send('PATCH', path, changes);
          onDone();
        }}
      />
    ),
  };
  const consequence = `New workbooks with lots of ${product.code} are not taken any more. Known lots stay.`;
  return [change, retiring(send, { name: product.code, isRetired: product.isRetired, path, consequence })];
}
