import '../summary.css';
import { type SummaryView, weekInWords } from '@app/contracts';
import { Link, useParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Skeleton } from '../../../shared/ui/skeleton';
import { When } from '../../../shared/ui/when';
import { useSummary } from '../api/summaries';
import { Allowances } from '../components/allowances';
import { AttentionIntakes } from '../components/attention-intakes';
import { ChangedByBaseline } from '../components/changed-lots';
import { Headline } from '../components/headline';
import { LinesTable } from '../components/lines-table';
import { NotScored } from '../components/not-scored';
import { OpenHolds } from '../components/open-holds';
import { NewVersionFailed, SummaryTools } from '../components/summary-tools';

/** What must be known of the week? */
export function SummaryPage() {
  const query = useSummary(Number(useParams().summaryId));
  useShowsLine(undefined, query.data?.plant.id);
  return (
    <Loaded
      query={query}
      failure="The summary could not be loaded."
      skeleton={<Skeleton lines={12} label="Loading the week’s summary" />}
    >
      {(summary) => <Summary key={summary.id} summary={summary} />}
    </Loaded>
  );
}

function Summary({ summary }: { summary: SummaryView }) {
  return (
    <div className="summary">
      <PageHeading
        title={`${summary.plant.name}, week of ${weekInWords(summary.week.startsOn)}`}
        lead={<Lead summary={summary} />}
        tools={<SummaryTools summary={summary} />}
      />
      <NewVersionFailed summary={summary} />
      <Headline summary={summary} />
      <LinesTable summary={summary} />
      <OpenHolds summary={summary} />
      <ChangedByBaseline summary={summary} />
      <Allowances summary={summary} />
      <NotScored summary={summary} />
      <AttentionIntakes summary={summary} />
    </div>
  );
}

function Lead({ summary }: { summary: SummaryView }) {
  const others = summary.versions.filter((version) => version.id !== summary.id);
  return (
    <>
      Version {summary.version}, made <When at={summary.madeAt} />.
      <span className="summary__ways">
        {others.map(({ id, version }) => (
          <span key={id}>
            {' '}
            <Link to={urls.summary(id)}>Version {version}</Link>
          </span>
        ))}{' '}
        <Link to={urls.summaries(summary.plant.id)}>All weeks</Link>
      </span>
    </>
  );
}
