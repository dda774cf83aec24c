import { useParams } from 'react-router-dom';
import { useLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { BlankWorkbook } from '../components/blank-workbook';
import { DropZone } from '../components/drop-zone';
import { KnownLayouts } from '../components/known-layouts';
import { RecentIntakes } from '../components/recent-intakes';
import '../components/intake.css';

/** Is my workbook in? The drop zone, and the line's recent intakes. */
export function IntakesPage() {
  const lineId = Number(useParams().lineId);
  const { lines } = useLine();
  const { can } = useSession();
  const lineName = lines.find((line) => line.id === lineId)?.name ?? 'this line';
  return (
    <>
      <PageHeading title={`Intake, ${lineName}`} />
      {can('upload_intake') && (
        <Sheet margin={<BlankWorkbook lineId={lineId} lineName={lineName} />}>
          <DropZone key={lineId} lineId={lineId} lineName={lineName} />
        </Sheet>
      )}
      <Sheet title="Recent workbooks" isFlush>
        <RecentIntakes lineId={lineId} lineName={lineName} />
      </Sheet>
      <KnownLayouts lineId={lineId} lineName={lineName} />
    </>
  );
}
