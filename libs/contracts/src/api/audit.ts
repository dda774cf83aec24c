import type { AuditChange } from '../audit-changes';
import type { Instant, Named, Page } from './common';

/** What an entry was done to; the name is null when nothing of that number has one. */
export interface AuditThing {
  kind: string;
  id: number;
  name: string | null;
}

export interface AuditEntryView {
  id: number;
  at: Instant;
  /** Id null: what Ebbline did by itself. */
  actor: { id: number | null; name: string };
  action: string;
  /** Who did what, whole. */
  sentence: string;
  thing: AuditThing;
  changes: AuditChange[];
  /** Network address of the person; null for work that was done later in somebody's name, or by Ebbline itself. */
  address: string | null;
}

/** GET plants/:id/audit, newest first. */
export type AuditPage = Page<AuditEntryView>;

/** GET plants/:id/audit/filters: what there is to choose from. */
export interface AuditFilterChoices {
  people: Named[];
  kinds: { kind: string; actions: string[] }[];
}

/** In place of a person's number: what Ebbline did by itself. */
export const AUDIT_BY_EBBLINE = 0;
