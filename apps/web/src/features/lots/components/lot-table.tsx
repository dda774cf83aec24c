import type { LotListItem } from '@app/contracts';
import { Column } from 'primereact/column';
import { DataTable } from 'primereact/datatable';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { scoreText } from '../../../shared/record/record-words';
import { Age } from '../../../shared/ui/age';
import { Mark } from '../../../shared/ui/mark';
import { fateWords, verdictWords } from '../../../shared/ui/mark-words';
import { When } from '../../../shared/ui/when';
import { quantityWords } from '../quantity-words';
import { sortOf, sortText } from '../sort';

interface LotTableProps {
  lots: LotListItem[];
  sort: string;
  onSort: (sort: string) => void;
}

export function LotTable({ lots, sort, onSort }: LotTableProps) {
  return (
    <DataTable
      className="lots folds"
      value={lots}
      dataKey="id"
      lazy
      {...sortOf(sort)}
      onSort={(event) => onSort(sortText(event.sortField, event.sortOrder))}
      tableClassName="lots__table"
    >
      <Column header="Lot" field="number" sortable bodyClassName="folds__first" body={lotCell} />
      <Column header="Line" body={(lot: LotListItem) => lot.line.name} bodyClassName="lots__line" />
      <Column header="Product" field="product" bodyClassName="lots__product" />
      <Column header="Start" field="startsAt" sortable body={startCell} bodyClassName="lots__start" />
      <Column
        header="Quantity"
        body={quantityWords}
        headerClassName="is-number"
        bodyClassName="is-number lots__quantity"
      />
      <Column header="Verdict" body={(lot: LotListItem) => verdictWords(lot.mark)} bodyClassName="lots__verdict" />
      <Column header="Stands out most in" field="score" sortable body={farthestCell} bodyClassName="lots__farthest" />
      <Column header="Fate" body={fateCell} bodyClassName="lots__fate" />
    </DataTable>
  );
}

const lotCell = (lot: LotListItem) => (
  <Link className="lots__number" to={urls.lot(lot.id)}>
    <Mark mark={lot.mark} isSilent />
    {lot.number}
  </Link>
);

const startCell = (lot: LotListItem) => <When at={lot.startsAt} form="short" />;

const farthestCell = (lot: LotListItem) =>
  lot.farthest === null ? (
    <span className="soft">–</span>
  ) : (
    <>
      {lot.farthest.channelName} <span className="number">{scoreText(lot.farthest.score)}</span>
    </>
  );

function fateCell(lot: LotListItem) {
  const fate = fateWords(lot.mark);
  if (fate === null) return null;
  if (lot.hold === null) return fate;
  return (
    <Link to={urls.hold(lot.hold.id)} title={`The hold of lot ${lot.number}`}>
      {fate}
      {lot.hold.state === 'open' && (
        <>
          {' '}
          for <Age since={lot.hold.openedAt} />
        </>
      )}
    </Link>
  );
}
