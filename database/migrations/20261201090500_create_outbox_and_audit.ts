import type { Knex } from 'knex';

/**
 * What is owed (jobs, mails), the weekly summaries, and the audit trail.
 * Why: queues may die with their process, what is owed may not; every change of state has its entry in the same transaction.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table owed_jobs (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint owed_jobs_plant_fkey references plants,
      name text not null,
      subject jsonb not null,
      state text not null default 'owed' constraint owed_jobs_state_check check (state in ('owed', 'done', 'failed')),
      attempts integer not null default 0,
      last_error text,
      owed_since timestamptz not null,
      ended_at timestamptz
    );
    create unique index owed_jobs_once on owed_jobs (name, subject) where state = 'owed';
    create index owed_jobs_owed_index on owed_jobs (id) where state = 'owed';
    comment on table owed_jobs is 'Work that must be done although the queue may be lost; queued again at start and on a timer.';

    create table outbox (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint outbox_plant_fkey references plants,
      event text not null,
      kind text not null,
      recipient text not null,
      subject text not null,
      html text not null,
      plain_text text not null,
      message_id text not null constraint outbox_message_id_key unique,
      state text not null default 'waiting' constraint outbox_state_check check (state in ('waiting', 'sent', 'failed')),
      attempts integer not null default 0,
      next_attempt_at timestamptz not null,
      leased_until timestamptz,
      last_error text,
      created_at timestamptz not null,
      sent_at timestamptz,
      constraint outbox_once_key unique (event, recipient, kind),
      constraint outbox_sent_check check ((state = 'sent') = (sent_at is not null))
    );
    create index outbox_waiting_index on outbox (next_attempt_at) where state = 'waiting';
    comment on table outbox is 'Mails, written in the transaction of the event that they tell of; one a recipient.';
    comment on column outbox.message_id is 'Stays the same over all attempts, so that a mail that arrived twice is known as one.';

    create table summaries (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint summaries_plant_fkey references plants,
      week_starts_on date not null constraint summaries_monday_check check (extract(isodow from week_starts_on) = 1),
      version integer not null,
      content jsonb not null,
      made_at timestamptz not null,
      constraint summaries_version_key unique (plant_id, week_starts_on, version)
    );
    create trigger summaries_append_only before update or delete or truncate on summaries for each statement execute function refuse_change();
    comment on table summaries is 'A plant''s week as it was told; versions are kept.';

    create table audit_entries (
      id bigint generated always as identity primary key,
      plant_id bigint constraint audit_entries_plant_fkey references plants,
      at timestamptz not null,
      recorded_at timestamptz not null default clock_timestamp(),
      actor_id bigint constraint audit_entries_actor_fkey references people,
      actor_name text not null,
      action text not null,
      thing_kind text not null,
      thing_id bigint not null,
      sentence text not null,
      before jsonb,
      after jsonb,
      address text
    );
    create index audit_entries_thing_index on audit_entries (thing_kind, thing_id);
    create index audit_entries_plant_index on audit_entries (plant_id, at desc);
    create trigger audit_entries_append_only before update or delete or truncate on audit_entries for each statement execute function refuse_change();
    comment on table audit_entries is 'Who did what to what, before and after; written in the transaction of the change itself, never changed.';
    comment on column audit_entries.recorded_at is 'The database''s own clock.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table audit_entries, summaries, outbox, owed_jobs;`);
}
