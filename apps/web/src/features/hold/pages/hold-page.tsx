import { remindedSentence, type HoldView } from '@app/contracts';
import { useRef } from 'react';
import { Link, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { useNow } from '../../../shared/time/use-now';
import { Age } from '../../../shared/ui/age';
import { Loaded } from '../../../shared/ui/loaded';
import { FATE_WORDS } from '../../../shared/ui/mark-words';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { When } from '../../../shared/ui/when';
import { useHold } from '../api/use-hold';
import { Decision } from '../components/decision';
import { Evidence } from '../components/evidence';
import { History } from '../components/history';
import { quantityText } from '../components/hold-words';
import { SetAside } from '../components/set-aside';
import { SimilarLots } from '../components/similar-lots';
import '../components/hold.css';

function Reminded({ reminders }: Pick<HoldView, 'reminders'>) {
  const sentence = remindedSentence(reminders, new Date(useNow()));
  return sentence === null ? null : ` ${sentence}`;
}

/** Shall this lot go? */
export function HoldPage() {
  const holdId = Number(useParams().holdId);
  const query = useHold(holdId);
  useShowsLine(query.data?.line.id, query.data?.plantId);
  return (
    <Loaded
      query={query}
      failure="The hold could not be loaded."
      skeleton={
        <>
          <PageHeading title="Hold" />
          <Sheet tone="held">
            <Skeleton lines={8} label="Loading the hold" />
          </Sheet>
        </>
      }
    >
      {(hold) => <Hold key={hold.id} hold={hold} />}
    </Loaded>
  );
}

function Hold({ hold }: { hold: HoldView }) {
  const evidence = useRef<HTMLDivElement>(null);
  const fate = hold.decision === null ? 'held' : FATE_WORDS[hold.decision.disposition];
  const readAgain = () => {
    evidence.current?.focus();
    evidence.current?.scrollIntoView({ block: 'start' });
  };
  return (
    <>
      <PageHeading title={`Lot ${hold.lot.number}, ${hold.line.name}: ${fate}`} lead={<Lead hold={hold} />} />
      <Sheet
        tone={hold.state === 'open' ? 'held' : 'plain'}
        margin={
          <p>
            A held lot may not move on until it is decided. A <b>provisional</b> verdict may still move as later
            readings arrive; people decide, the verdict does not.
          </p>
        }
      >
        <p className="hold-reason">{hold.reason}</p>
        <p className="soft">
          Held on <When at={hold.openedAt} />
          {hold.state === 'open' && (
            <>
              , for <Age since={hold.openedAt} /> now
            </>
          )}
          .{hold.state === 'open' && <Reminded reminders={hold.reminders} />}
          {hold.isLate && ' It came late: later readings moved the baseline under the lot.'}
        </p>
      </Sheet>
      <div ref={evidence} tabIndex={-1} className="hold-evidence">
        <Evidence hold={hold} />
      </div>
      <Sheet title="Similar lots and how they were decided">
        <SimilarLots similar={hold.similar} />
      </Sheet>
      <Sheet title="Set aside">
        <SetAside hold={hold} />
      </Sheet>
      <Decision hold={hold} onReadAgain={readAgain} />
      <Sheet title="What happened">
        <History entries={hold.history} />
      </Sheet>
    </>
  );
}

function Lead({ hold }: { hold: HoldView }) {
  const quantity = quantityText(hold.quantity, hold.quantityUnit);
  return (
    <>
      {hold.product}
      {quantity !== null && `, ${quantity}`}, made <When at={hold.lotStartsAt} form="short" /> to{' '}
      <When at={hold.lotEndsAt} form="time" />. <Link to={urls.lot(hold.lot.id)}>All about the lot</Link>
    </>
  );
}
