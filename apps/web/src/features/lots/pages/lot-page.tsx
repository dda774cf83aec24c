import '../lots.css';
import '../lot.css';
import type { LotView } from '@app/contracts';
import { useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { ActionLink } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Mark } from '../../../shared/ui/mark';
import { PageHeading } from '../../../shared/ui/page-heading';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useLot } from '../api/lots';
import { LotHistory } from '../components/lot-history';
import { LotLead } from '../components/lot-lead';
import { VerdictMargin } from '../components/verdict-margin';
import { VerdictTable } from '../components/verdict-table';

/** Why did this lot get its verdict? */
export function LotPage() {
  const lotId = Number(useParams().lotId);
  const query = useLot(lotId);
  useShowsLine(query.data?.line.id, query.data?.plantId);
  if (query.data !== undefined) return <LotContent lot={query.data} />;
  return (
    <>
      <PageHeading title="Lot" />
      <Sheet>
        {query.isError ? (
          <ProblemNotice
            problem={query.error}
            what="The lot could not be loaded."
            onRetry={() => void query.refetch()}
          />
        ) : (
          <Skeleton lines={9} label="Loading the lot" />
        )}
      </Sheet>
    </>
  );
}

function LotContent({ lot }: { lot: LotView }) {
  const isHeld = lot.hold?.state === 'open';
  return (
    <>
      <PageHeading
        title={`Lot ${lot.number}`}
        before={<Mark mark={lot.mark} size={26} />}
        lead={<LotLead lot={lot} />}
        tools={
          lot.hold !== null && (
            <ActionLink kind={isHeld ? 'main' : 'quiet'} to={urls.hold(lot.hold.id)}>
              {isHeld ? 'Open the hold' : 'Read the decided hold'}
            </ActionLink>
          )
        }
      />
      <Sheet
        title="Verdict on each channel"
        tone={isHeld ? 'held' : 'plain'}
        margin={<VerdictMargin verdicts={lot.verdicts} />}
        isFlush
      >
        {lot.verdicts.length === 0 ? (
          <EmptyNote>No channel has judged this lot yet. Verdicts appear once its workbook is scored.</EmptyNote>
        ) : (
          <VerdictTable lot={lot} />
        )}
      </Sheet>
      <Sheet title="History" margin={<p>What happened to the lot, and by whose hand. Nothing is overwritten.</p>}>
        <LotHistory lot={lot} />
      </Sheet>
    </>
  );
}
