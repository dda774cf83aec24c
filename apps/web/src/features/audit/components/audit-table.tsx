import { type AuditEntryView, nameInWords } from '@app/contracts';
import { Fragment, useState } from 'react';
import { Link } from 'react-router-dom';
import { useSession } from '../../../shared/session/session';
import { When } from '../../../shared/ui/when';
import { thingPage } from '../thing-page';
import { Changes } from './changes';

interface AuditTableProps {
  plantId: number;
  entries: AuditEntryView[];
  /** Narrows the trail to one thing. */
  onThing: (kind: string, id: number) => void;
}

export function AuditTable({ plantId, entries, onThing }: AuditTableProps) {
  return (
    <div className="table__wrap">
      <table className="plain folds audit">
        <caption className="visually-hidden">Who did what to what, newest first</caption>
        <thead>
          <tr>
            <th scope="col">Time</th>
            <th scope="col">Who</th>
            <th scope="col">What</th>
            <th scope="col">Thing</th>
            <th scope="col">From where</th>
          </tr>
        </thead>
        <tbody>
          {entries.map((entry) => (
            <Entry key={entry.id} entry={entry} plantId={plantId} onThing={onThing} />
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Entry({ entry, plantId, onThing }: { entry: AuditEntryView } & Omit<AuditTableProps, 'entries'>) {
  const [isOpen, setOpen] = useState(false);
  const { thing, changes } = entry;
  const name = thing.name ?? `${nameInWords(thing.kind)} ${thing.id}`;
  const { can } = useSession();
  const page = thingPage(thing, plantId, can);
  const changesId = `changes-${entry.id}`;
  return (
    <Fragment>
      <tr className={isOpen ? 'audit__entry audit__entry--open' : 'audit__entry'}>
        <td className="audit__time">
          <When at={entry.at} form="exact" />
        </td>
        <td className="audit__who">{entry.actor.name}</td>
        <td className="audit__what folds__first">
          {entry.sentence}
          {changes.length > 0 && (
            <button
              type="button"
              className="audit__toggle"
              aria-expanded={isOpen}
              aria-controls={changesId}
              onClick={() => setOpen(!isOpen)}
            >
              {isOpen ? 'Hide what changed' : 'Show what changed'}
            </button>
          )}
        </td>
        <td className="audit__thing">
          {page === null ? name : <Link to={page}>{name}</Link>}
          <button
            type="button"
            className="audit__toggle"
            aria-label={`All entries about ${name}`}
            onClick={() => onThing(thing.kind, thing.id)}
          >
            all its entries
          </button>
        </td>
        <td className={entry.address === null ? 'audit__where is-nothing' : 'audit__where'}>
          {entry.address ?? <span className="soft">–</span>}
        </td>
      </tr>
      {isOpen && (
        <tr id={changesId} className="audit__changes">
          <td colSpan={5} className="folds__first">
            <Changes changes={changes} />
          </td>
        </tr>
      )}
    </Fragment>
  );
}
