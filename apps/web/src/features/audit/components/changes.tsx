import type { AuditChange } from '@app/contracts';

/** Field by field what was there before and after. */
export function Changes({ changes }: { changes: AuditChange[] }) {
  const hasBefore = changes.some((change) => change.before !== null);
  return (
    <dl className="changes">
      {changes.map(({ field, before, after }) => (
        <div key={field} className="changes__field">
          <dt>{field}</dt>
          <dd>
            {hasBefore && (
              <>
                <span className="changes__before">{before ?? 'nothing'}</span>
                <span aria-hidden="true"> → </span>
                <span className="visually-hidden"> became </span>
              </>
            )}
            <span className="changes__after">{after ?? 'nothing'}</span>
          </dd>
        </div>
      ))}
    </dl>
  );
}
