import type { IntakeReadingPreview } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { When } from '../../../shared/ui/when';
import { valueText } from './value-text';

const has = (readings: readonly IntakeReadingPreview[], key: 'serial' | 'position' | 'quantity') =>
  readings.some((reading) => reading[key] !== null);

/** The first readings as Ebbline reads them: what would be stored. */
export function FirstRows({ readings }: { readings: IntakeReadingPreview[] }) {
  if (readings.length === 0) return <EmptyNote>No reading was found.</EmptyNote>;
  const columns: FoldingColumn<IntakeReadingPreview>[] = [
    { name: 'Row', isLead: true, cell: ({ sheet, row }) => `${sheet}, row ${row}` },
    { name: 'Time', cell: ({ at }) => <When at={at} form="exact" /> },
    { name: 'Shift', cell: ({ shift }) => shift ?? 'outside the shift calendar' },
    { name: 'Lot', cell: ({ lot }) => lot },
    { name: 'Product', cell: ({ product }) => product ?? 'not said' },
    { name: 'Channel', cell: ({ channelName }) => channelName },
    { name: 'Value', isNumber: true, cell: ({ value, censoring }) => valueText(value, censoring) },
    { name: 'Unit', cell: ({ unit }) => unit || '–' },
  ];
  if (has(readings, 'position')) columns.push({ name: 'Position', cell: ({ position }) => position ?? '' });
  if (has(readings, 'serial')) columns.push({ name: 'Serial', cell: ({ serial }) => serial ?? '' });
  if (has(readings, 'quantity'))
    columns.push({
      name: 'Quantity',
      isNumber: true,
      cell: ({ quantity }) => (quantity === null ? '' : String(quantity)),
    });
  return (
    <FoldingTable
      caption="The first readings as they are read"
      columns={columns}
      items={readings}
      keyOf={({ sheet, row, channelName, position }) => `${sheet} ${row} ${channelName} ${position ?? ''}`}
    />
  );
}
