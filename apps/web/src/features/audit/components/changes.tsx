import type { AuditChange } from '@app/contracts';

/** Field by field what was there before and after. */
export function Changes({ changes }: { changes: AuditChange[] }) {
  return (
    <dl className="changes">
      {changes.map((change) => (
        <div key={change.field} className="changes__field">
          <dt>{change.field}</dt>
          <dd>
            <Change {...change} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

function Change({ before, after }: AuditChange) {
  if (before === null) return after;
  if (after === null) return <span className="soft">was {before}</span>;
  return (
    <>
      <span className="soft">{before}</span>
      <span aria-hidden="true"> → </span>
      <span className="visually-hidden"> became </span>
      {after}
    </>
  );
}
