import type { IntakeListItem } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { FoldingTable, type FoldingColumn } from '../../../shared/ui/folding-table';
import { Loaded } from '../../../shared/ui/loaded';
import { When } from '../../../shared/ui/when';
import { useLineIntakes } from '../api/use-intakes';
import { STATE_WORDS } from './intake-words';

const number = (count: number) => count.toLocaleString('en-GB');

const COLUMNS: FoldingColumn<IntakeListItem>[] = [
  { name: 'Workbook', isLead: true, cell: (intake) => <Link to={urls.intake(intake.id)}>{intake.fileName}</Link> },
  { name: 'Received', cell: (intake) => <When at={intake.receivedAt} form="short" /> },
  { name: 'By', cell: (intake) => intake.receivedBy },
  { name: 'Rows read', isNumber: true, cell: (intake) => number(intake.rowsRead) },
  { name: 'Used', isNumber: true, cell: (intake) => number(intake.rowsUsed) },
  { name: 'Not used', isNumber: true, cell: (intake) => number(intake.rowsNotUsed) },
  {
    name: 'State',
    cell: (intake) => <span className={`intake-state intake-state--${intake.state}`}>{STATE_WORDS[intake.state]}</span>,
  },
];

/** The line's newest intakes. */
export function RecentIntakes({ lineId, lineName }: { lineId: number; lineName: string }) {
  const query = useLineIntakes(lineId);
  return (
    <Loaded
      query={query}
      failure="The intakes could not be loaded."
      isEmpty={(intakes) => intakes.length === 0}
      empty={<EmptyNote>No workbook of {lineName} came in yet. The first one dropped above will stand here.</EmptyNote>}
    >
      {(intakes) => (
        <FoldingTable
          caption={`Recent intakes of ${lineName}`}
          columns={COLUMNS}
          items={intakes}
          keyOf={(intake) => intake.id}
        />
      )}
    </Loaded>
  );
}
