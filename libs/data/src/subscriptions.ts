import { MAIL_KIND_DEFAULT_ROLES, MAIL_KIND_ROLES, MAIL_KINDS, type MailKind, type Role } from '@app/contracts';
import { type Queryable, rows, type Transaction } from './database';

export interface MailRecipient {
  id: number;
  name: string;
  email: string;
}

/** A person gets mail once they have chosen a password, until they are disabled. */
const REACHABLE = 'p.disabled_at is null and p.password_hash is not null';

/**
 * Who gets a mail about a line: those who said so, and without a word the plant's quality managers and the line's engineers and
 * line leads. A word for it holds for the lines that the person is assigned to, or for all when assigned to none.
 */
export function listLineRecipients(
  db: Queryable,
  lineId: number,
  kind: 'held_lots' | 'decisions',
): Promise<MailRecipient[]> {
  return rows<MailRecipient>(
    db,
    `select p.id, p.name, p.email from people p join lines l on l.id = :lineId
       left join mail_subscriptions s on s.plant_id = l.plant_id and s.person_id = p.id and s.kind = :kind
       cross join lateral (select
         exists (select 1 from line_assignments a where a.line_id = l.id and a.person_id = p.id) as here,
         exists (select 1 from line_assignments a where a.plant_id = l.plant_id and a.person_id = p.id) as anywhere) a
     where ${REACHABLE} and exists (
       select 1 from memberships m where m.person_id = p.id and m.plant_id = l.plant_id and m.role = any(:roles) and case
         when s.is_wanted is null then m.role = 'quality_manager' or (m.role = any(:defaultRoles) and a.here)
         else s.is_wanted and (m.role = 'quality_manager' or a.here or not a.anywhere) end)
     order by p.email`,
    { lineId, kind, roles: [...MAIL_KIND_ROLES[kind]], defaultRoles: [...MAIL_KIND_DEFAULT_ROLES[kind]] },
  );
}

/** Who gets the plant's weekly summary: directors unless they do not want it, and others who may read it and want it. */
export function listSummaryRecipients(db: Queryable, plantId: number): Promise<MailRecipient[]> {
  return listPlantRecipients(db, plantId, 'weekly_summary', MAIL_KIND_ROLES.weekly_summary);
}

/** Whom of this role the plant reminds of open holds. */
export function listReminderRecipients(
  db: Queryable,
  plantId: number,
  role: 'quality_manager' | 'director',
): Promise<MailRecipient[]> {
  return listPlantRecipients(db, plantId, 'hold_reminders', [role]);
}

function listPlantRecipients(
  db: Queryable,
  plantId: number,
  kind: MailKind,
  roles: readonly Role[],
): Promise<MailRecipient[]> {
  return rows<MailRecipient>(
    db,
    `select p.id, p.name, p.email from people p
       left join mail_subscriptions s on s.plant_id = :plantId and s.person_id = p.id and s.kind = :kind
     where ${REACHABLE} and exists (select 1 from memberships m where m.person_id = p.id and m.plant_id = :plantId
       and m.role = any(:roles) and coalesce(s.is_wanted, m.role = any(:defaultRoles)))
     order by p.email`,
    { plantId, kind, roles: [...roles], defaultRoles: [...MAIL_KIND_DEFAULT_ROLES[kind]] },
  );
}

export interface MailSubscription {
  kind: MailKind;
  isWanted: boolean;
  /** Whether the person said so; otherwise it follows from the roles. */
  isChosen: boolean;
}

/** What a person with these roles gets from the plant, one entry for each kind that the roles may have. */
export async function listSubscriptions(
  db: Queryable,
  plantId: number,
  personId: number,
  roles: readonly Role[],
): Promise<MailSubscription[]> {
  const chosen = await rows<{ kind: MailKind; isWanted: boolean }>(
    db,
    `select kind, is_wanted as "isWanted" from mail_subscriptions where plant_id = :plantId and person_id = :personId`,
    { plantId, personId },
  );
  const has = (allowed: readonly Role[]) => roles.some((role) => allowed.includes(role));
  return MAIL_KINDS.filter((kind) => has(MAIL_KIND_ROLES[kind])).map((kind) => {
    const word = chosen.find((row) => row.kind === kind);
    return {
      kind,
      isWanted: word?.isWanted ?? has(MAIL_KIND_DEFAULT_ROLES[kind]),
      isChosen: word !== undefined,
    };
  });
}

/** Sets what the person wants; kinds that are not named stay as they are. */
export async function upsertSubscriptions(
  tx: Transaction,
  plantId: number,
  personId: number,
  wanted: { kind: MailKind; isWanted: boolean }[],
): Promise<void> {
  if (wanted.length === 0) return;
  await tx('mail_subscriptions')
    .insert(wanted.map(({ kind, isWanted }) => ({ plant_id: plantId, person_id: personId, kind, is_wanted: isWanted })))
    .onConflict(['plant_id', 'person_id', 'kind'])
    .merge(['is_wanted']);
}
