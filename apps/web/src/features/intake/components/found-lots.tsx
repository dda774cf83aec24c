import type { IntakeView } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { When } from '../../../shared/ui/when';

type FoundLot = IntakeView['lots'][number];

const COLUMNS: FoldingColumn<FoundLot>[] = [
  { name: 'Lot', isLead: true, cell: (lot) => lot.number },
  { name: 'Product', cell: (lot) => lot.product ?? 'not said' },
  { name: 'Readings', isNumber: true, cell: (lot) => lot.readings.toLocaleString('en-GB') },
  { name: 'First reading', cell: (lot) => <When at={lot.firstAt} form="short" /> },
  { name: 'Last reading', cell: (lot) => <When at={lot.lastAt} form="short" /> },
];

export function FoundLots({ lots }: { lots: IntakeView['lots'] }) {
  if (lots.length === 0) return <EmptyNote>No lot was found in the workbook.</EmptyNote>;
  return (
    <FoldingTable caption="Lots found in the workbook" columns={COLUMNS} items={lots} keyOf={(lot) => lot.number} />
  );
}
