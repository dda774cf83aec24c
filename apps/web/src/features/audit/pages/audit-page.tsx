import '../audit.css';
import { useParams, useSearchParams } from 'react-router-dom';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useAudit, useAuditChoices } from '../api/audit';
import { AuditFilterBar } from '../components/audit-filter-bar';
import { AuditTable } from '../components/audit-table';
import { ExportAudit } from '../components/export-audit';
import { type AuditFilters, auditFiltersIn, auditPath, auditSearch, isNarrowed, PAGE_SIZE } from '../filters';

/** Who did what to what, when and from where? */
export function AuditPage() {
  const plantId = Number(useParams().plantId);
  useShowsLine(undefined, plantId);
  const { plant } = useSession();
  const [search, setSearch] = useSearchParams();
  const filters = auditFiltersIn(search);
  const query = useAudit(plantId, plant.timeZone, filters);
  const choices = useAuditChoices(plantId);
  const change = (next: Partial<AuditFilters>) =>
    setSearch(auditSearch({ ...filters, page: null, ...next }), {
      replace: true,
      preventScrollReset: next.page === undefined,
    });
  const total = query.data?.total ?? 0;
  return (
    <>
      <PageHeading
        title="Audit"
        lead={`Who did what at ${plant.name}, as it was written when it happened. Nobody can change or remove an entry.`}
        tools={<ExportAudit path={auditPath(plantId, plant.timeZone, filters, { isExport: true })} total={total} />}
      />
      <AuditFilterBar filters={filters} choices={choices.data} onChange={change} />
      <Sheet isFlush>
        <Loaded
          query={query}
          failure="The audit could not be loaded."
          skeleton={<Skeleton lines={12} label="Loading the audit" />}
          isEmpty={(page) => page.total === 0}
          empty={<NoEntries isFiltered={isNarrowed(filters)} />}
        >
          {(page) => (
            <>
              <AuditTable
                plantId={plantId}
                entries={page.items}
                onThing={(kind, thing) => change({ kind, thing, action: null })}
              />
              <Steps
                total={page.total}
                page={page.page}
                isStale={query.isPlaceholderData}
                onPage={(number) => change({ page: number })}
              />
            </>
          )}
        </Loaded>
      </Sheet>
    </>
  );
}

function NoEntries({ isFiltered }: { isFiltered: boolean }) {
  return (
    <EmptyNote>
      {isFiltered
        ? 'No entry fits all of these filters. Take one away to see more.'
        : 'Nothing was done here yet. Each upload, decision and change writes its entry.'}
    </EmptyNote>
  );
}

interface StepsProps {
  total: number;
  page: number;
  isStale: boolean;
  onPage: (page: number) => void;
}

function Steps({ total, page, isStale, onPage }: StepsProps) {
  const first = (page - 1) * PAGE_SIZE + 1;
  const last = Math.min(total, page * PAGE_SIZE);
  const shown = first > total ? `None of ${total} entries is on this page` : `${first}–${last} of ${total} entries`;
  return (
    <nav className="audit__steps" aria-label="Pages of the audit">
      <span aria-live="polite" className="soft">
        {isStale ? 'Loading…' : total === 1 ? '1 entry' : shown}
      </span>
      {(total > PAGE_SIZE || page > 1) && (
        <>
          <Action kind="plain" isDisabled={page <= 1} onPress={() => onPage(page - 1)}>
            Newer
          </Action>
          <Action kind="plain" isDisabled={last >= total} onPress={() => onPage(page + 1)}>
            Older
          </Action>
        </>
      )}
    </nav>
  );
}
