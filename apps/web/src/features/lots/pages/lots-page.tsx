import '../lots.css';
import { useSearchParams } from 'react-router-dom';
import { urls, type LotFilters } from '../../../app/urls';
import { useSession } from '../../../shared/session/session';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useLots } from '../api/lots';
import { ExportLots } from '../components/export-lots';
import { LotFilterBar } from '../components/lot-filter-bar';
import { LotTable } from '../components/lot-table';
import { PageSteps } from '../components/page-steps';
import { filtersIn, isNarrowed } from '../filters';

/** Find a lot, its verdicts and its fate. */
export function LotsPage() {
  const { plant } = useSession();
  const [search, setSearch] = useSearchParams();
  const filters = filtersIn(search);
  const query = useLots(filters, plant);
  const change = (next: Partial<LotFilters>) => {
    const address = urls.lots({ ...filters, page: null, ...next });
    setSearch(new URLSearchParams(address.split('?')[1] ?? ''), {
      replace: true,
      preventScrollReset: next.page === undefined,
    });
  };
  return (
    <>
      <PageHeading title="Lots" tools={<ExportLots filters={filters} total={query.data?.total ?? 0} />} />
      <LotFilterBar filters={filters} onChange={change} />
      <Sheet isFlush>
        <Loaded
          query={query}
          failure="The lots could not be loaded."
          skeleton={<Skeleton lines={12} label="Loading lots" />}
          isEmpty={(page) => page.total === 0}
          empty={<NoLots isFiltered={isNarrowed(filters)} />}
        >
          {(page) => (
            <>
              <LotTable lots={page.items} sort={filters.sort ?? ''} onSort={(sort) => change({ sort })} />
              <PageSteps {...page} isStale={query.isPlaceholderData} onPage={(number) => change({ page: number })} />
            </>
          )}
        </Loaded>
      </Sheet>
    </>
  );
}

function NoLots({ isFiltered }: { isFiltered: boolean }) {
  return (
    <EmptyNote>
      {isFiltered
        ? 'No lot fits all of these filters. Take one away to see more.'
        : 'No lots yet. They appear once a shift’s workbook is in.'}
    </EmptyNote>
  );
}
