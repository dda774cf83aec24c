import '../summary.css';
import { type SummaryListView, type SummaryRequested, weekInWords } from '@app/contracts';
import { useState } from 'react';
import { Link, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { When } from '../../../shared/ui/when';
import { useMakeSummary, useSummaries } from '../api/summaries';
import { NotMade } from '../components/not-made';
import { isAwaited, underWayOf } from '../week';

/** Which week? */
export function SummariesPage() {
  const plantId = Number(useParams().plantId);
  useShowsLine(undefined, plantId);
  const [awaited, setAwaited] = useState<SummaryRequested | null>(null);
  const query = useSummaries(plantId, awaited);
  const isBeingMade = isAwaited(query.data, awaited);
  return (
    <>
      <PageHeading
        title="Weekly summaries"
        lead="A page a week, made on Monday morning and sent to the director and whoever wants it."
      />
      <Sheet margin={<p>A week runs from Monday to Sunday by the plant’s own clocks.</p>}>
        <Loaded query={query} failure="The summaries could not be loaded.">
          {(list) => (
            <>
              <MissingWeek plantId={plantId} list={list} isBeingMade={isBeingMade} onRequested={setAwaited} />
              <Weeks list={list} />
            </>
          )}
        </Loaded>
      </Sheet>
    </>
  );
}

const MAKE_IT = 'Make it now';

interface MissingWeekProps {
  plantId: number;
  list: SummaryListView;
  isBeingMade: boolean;
  onRequested: (requested: SummaryRequested) => void;
}

/** The last complete week, where it has no summary yet. */
function MissingWeek({ plantId, list, isBeingMade, onRequested }: MissingWeekProps) {
  const making = useMakeSummary(plantId, onRequested);
  const weekStartsOn = list.lastWeekStartsOn;
  if (list.items.some((item) => item.weekStartsOn === weekStartsOn)) return null;
  const item = underWayOf(list, weekStartsOn);
  const isBusy = making.isPending || isBeingMade || item?.state === 'being_made';
  const hasFailed = item?.state === 'failed' && !isBusy;
  if (!list.maySend && !hasFailed) return null;
  return (
    <>
      {hasFailed && <NotMade failed={item} askAgain={list.maySend ? MAKE_IT : null} />}
      {list.maySend && (
        <p className="summary__missing">
          The week of {weekInWords(weekStartsOn)} has no summary yet.{' '}
          <Action kind="quiet" isBusy={isBusy} onPress={() => making.mutate({ weekStartsOn })}>
            {isBusy ? 'Being made…' : MAKE_IT}
          </Action>
        </p>
      )}
    </>
  );
}

function Weeks({ list }: { list: SummaryListView }) {
  if (list.items.length === 0) {
    return (
      <EmptyNote>No week has been summed up yet. The first summary comes on the Monday after a week’s end.</EmptyNote>
    );
  }
  return (
    <ol className="summary__weeks">
      {list.items.map((item) => (
        <li key={item.id}>
          <Link className="summary__week" to={urls.summary(item.id)}>
            {weekInWords(item.weekStartsOn)}
          </Link>
          <p>{item.headline}</p>
          <p className="soft">
            {item.version > 1 && `Version ${item.version}, `}made <When at={item.madeAt} form="short" />
          </p>
        </li>
      ))}
    </ol>
  );
}
