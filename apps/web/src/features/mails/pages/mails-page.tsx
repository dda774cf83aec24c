import '../mails.css';
import { useParams, useSearchParams } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { useShowsLine } from '../../../shared/line-context/line-context';
import { Action } from '../../../shared/ui/action';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { PageHeading } from '../../../shared/ui/page-heading';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useMails } from '../api/mails';
import { MailFilterBar } from '../components/mail-filter-bar';
import { MailTable } from '../components/mail-table';
import { type MailFilters, mailFiltersIn, PAGE_SIZE } from '../filters';
import { countsSentence } from '../mail-words';

/** Did the plant's mails arrive? */
export function MailsPage() {
  const plantId = Number(useParams().plantId);
  useShowsLine(undefined, plantId);
  const [search, setSearch] = useSearchParams();
  const filters = mailFiltersIn(search);
  const query = useMails(plantId, filters);
  const change = (next: Partial<MailFilters>) => {
    const address = urls.mails(plantId, { ...filters, page: null, ...next });
    setSearch(new URLSearchParams(address.split('?')[1] ?? ''), { replace: true });
  };
  return (
    <>
      <PageHeading title="Mail" lead={query.data && countsSentence(query.data.counts)} />
      <MailFilterBar filters={filters} kinds={query.data?.kinds ?? []} onChange={change} />
      <Sheet
        isFlush
        margin={
          <p>
            A mail that the mail server does not take is tried again for about a day, then given up. Why it was not
            taken stands in the server’s own words.
          </p>
        }
      >
        <Loaded
          query={query}
          failure="The mails could not be loaded."
          skeleton={<Skeleton lines={10} label="Loading mails" />}
          isEmpty={(page) => page.total === 0}
          empty={<NoMails isFiltered={filters.state !== null || filters.kind !== null} />}
        >
          {(page) => (
            <>
              <MailTable mails={page.items} />
              <Steps page={page.page} total={page.total} onPage={(number) => change({ page: number })} />
            </>
          )}
        </Loaded>
      </Sheet>
    </>
  );
}

function NoMails({ isFiltered }: { isFiltered: boolean }) {
  return (
    <EmptyNote>
      {isFiltered
        ? 'No mail fits these filters.'
        : 'No mail yet. Mails come when lots are held, decided or left undecided, each week, and when people are invited.'}
    </EmptyNote>
  );
}

function Steps({ page, total, onPage }: { page: number; total: number; onPage: (page: number) => void }) {
  const last = Math.min(total, page * PAGE_SIZE);
  return (
    <nav className="mails__steps" aria-label="Pages of mails">
      <span className="soft" aria-live="polite">
        {(page - 1) * PAGE_SIZE + 1}–{last} of {total} {total === 1 ? 'mail' : 'mails'}
      </span>
      {total > PAGE_SIZE && (
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
