import { Action } from '../../../shared/ui/action';

interface PageStepsProps {
  total: number;
  page: number;
  pageSize: number;
  /** The rows shown are still those of the last question. */
  isStale: boolean;
  onPage: (page: number) => void;
}

/** "51–100 of 231 lots", and steps to the pages beside. */
export function PageSteps({ total, page, pageSize, isStale, onPage }: PageStepsProps) {
  const first = (page - 1) * pageSize + 1;
  const last = Math.min(total, page * pageSize);
  return (
    <nav className="page-steps" aria-label="Pages of lots">
      <span aria-live="polite" className="soft">
        {isStale ? 'Loading…' : `${first}–${last} of ${total} ${total === 1 ? 'lot' : 'lots'}`}
      </span>
      {total > pageSize && (
        <>
          <Action kind="plain" isDisabled={page <= 1} onPress={() => onPage(page - 1)}>
            Back
          </Action>
          <Action kind="plain" isDisabled={last >= total} onPress={() => onPage(page + 1)}>
            Further
          </Action>
        </>
      )}
    </nav>
  );
}
