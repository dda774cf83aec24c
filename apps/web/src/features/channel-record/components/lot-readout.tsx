import type { Characteristic, RecordLot } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { Mark } from '../../../shared/ui/mark';
import { When } from '../../../shared/ui/when';
import { lotFigures } from '../../../shared/record/record-words';

interface LotReadoutProps {
  lot: RecordLot | null;
  characteristic: Characteristic;
}

/** What the pointer reads off the panes: the lot's name and its figures, always at the same place. */
export function LotReadout({ lot, characteristic }: LotReadoutProps) {
  if (lot === null) {
    return <p className="lot-readout soft">Point at a lot to read its figures; click it to open the lot.</p>;
  }
  return (
    <p className="lot-readout">
      <Mark mark={lot.mark} isSilent />
      <Link className="lot-readout__lot" to={urls.lot(lot.id)}>
        Lot {lot.number}
      </Link>
      <span className="soft">
        {lot.product}, <When at={lot.startsAt} form="short" />
      </span>
      {lotFigures(lot, characteristic).map((figure) => (
        <span key={figure}>{figure}</span>
      ))}
    </p>
  );
}
