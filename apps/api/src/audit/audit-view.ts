import { type AuditEntryView, changesOf } from '@app/contracts';
import type { AuditRow } from '@app/data';
import { zonedText } from '@app/mail';

export function auditEntryView(row: AuditRow, timeZone: string): AuditEntryView {
  return {
    id: row.id,
    at: row.at.toISOString(),
    actor: { id: row.actorId, name: row.actorName },
    action: row.action,
    sentence: row.sentence,
    thing: { kind: row.thingKind, id: row.thingId, name: row.thingName },
    changes: changesOf(row.before, row.after, (iso) => zonedText(new Date(iso), timeZone)),
    address: row.address,
  };
}
