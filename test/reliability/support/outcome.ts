import type { MailCatcher } from '@app/mail';
import { Client } from 'pg';

/** What stands in the database after a run, without ids, times and what may differ from run to run; order is part of it. */
const QUERIES: Record<string, string> = {
  intakes: `select file_name, state, rows_read, rows_used, rows_already_there, rows_not_used, readings_stored, readings_already_there,
    encode(sha256, 'hex') as sha256, (select encode(sha256(bytes), 'hex') from intake_bytes b where b.intake_id = i.id) as bytes
    from intakes i order by i.id`,
  problems: `select sheet, "row", "column", code, detail, severity from intake_problems order by id`,
  staged: 'select count(*)::int as count from staged_readings',
  lots: 'select number, run, starts_at, ends_at from lots order by number',
  readings: `select c.name, l.number, r.measured_at, r.value, r.occurrence, r.serial, r.position from readings r
    join channels c on c.id = r.channel_id join lots l on l.id = r.lot_id order by c.name, r.measured_at, l.number, r.occurrence`,
  lotChannels: `select c.name, l.number, lc.count, lc.mean, lc.sum_squares, lc.blocks from lot_channels lc
    join channels c on c.id = lc.channel_id join lots l on l.id = lc.lot_id order by c.name, l.number`,
  fits: `select c.name, f.edf, f.lambda, f.point_count, i.file_name from fits f join channels c on c.id = f.channel_id
    left join intakes i on i.id = f.intake_id order by c.name, f.id`,
  verdicts: `select c.name, l.number, v.is_current, v.control_state, v.is_provisional, v.not_scored_reason, v.score, v.score_limit, v.lot_mean,
    v.baseline, v.reading_count, v.specification_state, v.constant_state,
    array(select s.signal || ' ' || s.action from verdict_signals s where s.verdict_id = v.id order by 1) as signals
    from verdicts v join channels c on c.id = v.channel_id join lots l on l.id = v.lot_id order by c.name, l.number, v.id`,
  curve: `select c.name, b.at, b.value from baseline_points b join channels c on c.id = b.channel_id order by c.name, b.at`,
  holds: `select l.number, h.state, h.is_late, h.evidence_version,
    array(select k.signal || ': ' || k.sentence from hold_causes k where k.hold_id = h.id order by k.id) as causes
    from holds h join lots l on l.id = h.lot_id order by h.id`,
  /** Without the sign-ins of the client, which fall where the programs are started again. */
  audit: `select actor_name, action, thing_kind, sentence from audit_entries where action <> 'sign-in' order by id`,
  outbox: 'select kind, recipient, subject, state, last_error from outbox order by recipient, kind',
  owed: 'select name, state from owed_jobs order by id',
};

export type Outcome = Record<string, unknown[]>;

const withoutIds = (text: string) => text.replace(/\/holds\/\d+/g, '/holds/#');

/** Reads the outcome of a run: what is stored, and the mails that the catcher has. */
export async function readOutcome(url: string, catcher: MailCatcher): Promise<Outcome> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    const outcome: Outcome = {};
    for (const [name, sql] of Object.entries(QUERIES)) outcome[name] = (await client.query(sql)).rows as unknown[];
    outcome.mails = catcher
      .messages()
      .map(({ to, subject, text, html }) => ({ to, subject, text: withoutIds(text), html: withoutIds(html) }))
      .sort((a, b) => (a.to < b.to ? -1 : 1));
    return outcome;
  } finally {
    await client.end();
  }
}

/** Message-IDs of the outbox, sorted: each must be in the catcher once. */
export async function outboxMessageIds(url: string): Promise<string[]> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    const { rows } = await client.query<{ message_id: string }>('select message_id from outbox');
    return rows.map((row) => row.message_id).sort();
  } finally {
    await client.end();
  }
}
