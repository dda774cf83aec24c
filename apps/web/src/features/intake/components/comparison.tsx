import type { DifferingReading, IntakeComparison } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { When } from '../../../shared/ui/when';
import { counted } from './intake-words';
import { valueText } from './value-text';

const LISTED_LOTS = 12;

/** What is stored already of the same lots, and where it differs: to be read before confirming. */
export function Comparison({ comparison }: { comparison: IntakeComparison }) {
  const { overlaps, readingsDiffering, differing, readingsNotInFile, lotsDecided, lotsSettled } = comparison;
  return (
    <div className="comparison">
      <ul className="comparison__list">
        <li>
          {counted(comparison.readingsNew, 'reading is', 'readings are')} new,{' '}
          {counted(comparison.readingsAlreadyThere, 'is', 'are')} there already with the same value
          {readingsDiffering > 0 && (
            <b>, {counted(readingsDiffering, 'has', 'have')} another value than the stored one</b>
          )}
          .
        </li>
        {overlaps.map(({ intakeId, fileName, receivedAt, receivedBy, lots }) => (
          <li key={intakeId}>
            <Link to={urls.intake(intakeId)}>{fileName}</Link> of {receivedBy}, <When at={receivedAt} form="short" />,
            brought readings of {listed(lots)}.
          </li>
        ))}
        {readingsNotInFile > 0 && (
          <li>
            {counted(
              readingsNotInFile,
              'reading that is stored for these lots is',
              'readings that are stored for these lots are',
            )}{' '}
            not in this workbook; they stay.
          </li>
        )}
        {lotsDecided.length > 0 && (
          <li>Decided already: {listed(lotsDecided)}. The decision stays; what changes is shown beside it.</li>
        )}
        {lotsSettled.length > 0 && <li>With settled verdicts: {listed(lotsSettled)}.</li>}
      </ul>
      {differing.length > 0 && (
        <>
          <h3>Readings with another value</h3>
          <FoldingTable
            caption="Readings with another value than the stored one"
            columns={COLUMNS}
            items={differing}
            keyOf={keyOf}
          />
          {readingsDiffering > differing.length && (
            <p className="soft">and {(readingsDiffering - differing.length).toLocaleString('en-GB')} more.</p>
          )}
        </>
      )}
    </div>
  );
}

const keyOf = ({ sheet, row, column }: DifferingReading) => `${sheet}!${column}${row}`;

const withUnit = (text: string, unit: string): string => (unit === '' ? text : `${text}\u202f${unit}`);

const COLUMNS: FoldingColumn<DifferingReading>[] = [
  { name: 'Cell', isLead: true, cell: keyOf },
  { name: 'Lot', cell: ({ lot }) => lot },
  { name: 'Channel', cell: ({ channelName }) => channelName },
  { name: 'Time', cell: ({ at }) => <When at={at} form="exact" /> },
  { name: 'Stored', isNumber: true, cell: (one) => withUnit(valueText(one.stored, one.storedCensoring), one.unit) },
  {
    name: 'In this workbook',
    isNumber: true,
    cell: (one) => withUnit(valueText(one.incoming, one.incomingCensoring), one.unit),
  },
];

/** "lots 24117, 24118 and 5 more". */
function listed(lots: readonly string[]): string {
  const shown = lots.slice(0, LISTED_LOTS).join(', ');
  const more = lots.length > LISTED_LOTS ? ` and ${lots.length - LISTED_LOTS} more` : '';
  return `${lots.length === 1 ? 'lot' : 'lots'} ${shown}${more}`;
}
