import type { AuditThing, Permission } from '@app/contracts';
import { urls } from '../../app/urls';

const PAGES: Record<string, (id: number) => string> = {
  hold: urls.hold,
  lot: urls.lot,
  intake: urls.intake,
  plan: urls.plan,
  channel: urls.channel,
  mail: urls.mail,
  summary: urls.summary,
};

/** Where a plant's set-up shows things of the kind. */
const SECTIONS: Record<string, string> = {
  line: 'lines',
  product: 'products',
  characteristic: 'characteristics',
  gauge: 'gauges',
  specification: 'specifications',
  specification_proposal: 'specifications',
};

/** Pages that not everybody who reads the audit may open. */
const TAKES: Record<string, Permission> = { person: 'set_up_plant', mail: 'set_up_plant', summary: 'read_summary' };

/** The page of the thing that an entry is about; null where it has none that the reader may open. */
export function thingPage(thing: AuditThing, plantId: number, can: (permission: Permission) => boolean): string | null {
  if (!can(TAKES[thing.kind] ?? 'read')) return null;
  if (thing.kind === 'person') return urls.people(plantId);
  if (thing.kind === 'plant') return urls.setUp(plantId);
  if (thing.kind in SECTIONS) return urls.setUp(plantId, SECTIONS[thing.kind]);
  return PAGES[thing.kind]?.(thing.id) ?? null;
}
