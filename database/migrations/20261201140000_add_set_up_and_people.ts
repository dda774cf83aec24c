import type { Knex } from 'knex';

/**
 * What a plant's own set-up, its people, its weekly summary and its reminders need beside what is there.
 * Why: a new plant reaches its first scored lot through the pages alone; people come by invitation; holds that grow old are told of, once.
 * Locks: plants, people, lines, products, characteristics, gauges and channels, for a moment each (new columns rewrite nothing). Goes back: yes, unless
 * somebody has been invited and has no password yet: then it says so.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table people alter column password_hash drop not null, add column theme text not null default 'system'
      constraint people_theme_check check (theme in ('system', 'light', 'dark'));
    comment on column people.password_hash is 'Null until an invited person has chosen a password; nobody signs in without one.';

    create table person_tokens (
      id bigint generated always as identity primary key,
      person_id bigint not null constraint person_tokens_person_fkey references people,
      purpose text not null constraint person_tokens_purpose_check check (purpose in ('invitation', 'password_reset', 'first_administrator')),
      token_hash bytea not null constraint person_tokens_token_key unique,
      created_at timestamptz not null,
      expires_at timestamptz not null constraint person_tokens_expiry_check check (expires_at > created_at),
      used_at timestamptz,
      revoked_at timestamptz
    );
    create index person_tokens_person_index on person_tokens (person_id);
    comment on table person_tokens is 'Links sent by mail (or printed, for the first administrator), kept as hashes; each works once, until it expires.';

    create table mail_subscriptions (
      plant_id bigint not null constraint mail_subscriptions_plant_fkey references plants,
      person_id bigint not null constraint mail_subscriptions_person_fkey references people,
      kind text not null constraint mail_subscriptions_kind_check check (kind in ('weekly_summary', 'held_lots', 'decisions', 'hold_reminders')),
      is_wanted boolean not null,
      primary key (plant_id, person_id, kind)
    );
    comment on table mail_subscriptions is 'What a person wants or does not want by mail; without a row the default of their roles holds.';

    alter table plants
      add column reminder_manager_hours double precision not null default 8 constraint plants_reminder_manager_check check (reminder_manager_hours > 0),
      add column reminder_director_hours double precision not null default 24,
      add column allowance_notice_share double precision not null default 0.1 constraint plants_allowance_notice_check check (allowance_notice_share > 0),
      add column allowance_cap_share double precision not null default 0.25,
      add column currency text,
      add constraint plants_reminder_director_check check (reminder_director_hours >= reminder_manager_hours),
      add constraint plants_allowance_cap_check check (allowance_cap_share >= allowance_notice_share);
    comment on column plants.reminder_manager_hours is 'Age of an open hold at which quality managers are reminded, h.';
    comment on column plants.reminder_director_hours is 'Age at which directors are, h.';
    comment on column plants.allowance_notice_share is 'Movement of a baseline that is told, as a share of the tolerance; frozen into plans when they are proposed.';
    comment on column plants.allowance_cap_share is 'Movement beyond which lots are not scored, as a share of the tolerance.';
    comment on column plants.currency is 'What values of products are stated in, such as EUR; null: none are stated.';

    alter table products
      add column value_per_unit double precision constraint products_value_check check (value_per_unit > 0),
      add column retired_at timestamptz;
    comment on column products.value_per_unit is 'What one unit of a lot''s quantity is worth, in the plant''s currency; null: not stated.';
    alter table lines add column retired_at timestamptz;
    alter table characteristics add column retired_at timestamptz;
    alter table gauges add column retired_at timestamptz;
    alter table channels add column retired_at timestamptz;

    create table specification_proposals (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      product_id bigint not null,
      characteristic_id bigint not null,
      nominal double precision not null,
      lower double precision,
      upper double precision,
      applies_to_individuals boolean not null,
      valid_from timestamptz not null,
      reason text not null constraint specification_proposals_reason_check check (length(trim(reason)) > 0),
      state text not null default 'proposed' constraint specification_proposals_state_check check (state in ('proposed', 'approved', 'withdrawn')),
      proposed_by bigint not null constraint specification_proposals_proposer_fkey references people,
      proposed_at timestamptz not null,
      ended_by bigint constraint specification_proposals_ender_fkey references people,
      ended_at timestamptz,
      specification_id bigint,
      constraint specification_proposals_product_fkey foreign key (plant_id, product_id) references products (plant_id, id),
      constraint specification_proposals_characteristic_fkey foreign key (plant_id, characteristic_id) references characteristics (plant_id, id),
      constraint specification_proposals_specification_fkey foreign key (plant_id, specification_id) references specifications (plant_id, id),
      constraint specification_proposals_limits_check check (lower < upper and (lower is not null or upper is not null)),
      constraint specification_proposals_second_person check (state <> 'approved' or ended_by <> proposed_by),
      constraint specification_proposals_ended_check check ((state = 'proposed') = (ended_at is null) and (ended_at is null) = (ended_by is null)),
      constraint specification_proposals_approved_check check ((state = 'approved') = (specification_id is not null))
    );
    create unique index specification_proposals_one_pending on specification_proposals (product_id, characteristic_id) where state = 'proposed';
    comment on table specification_proposals is 'New versions of specifications on their way: proposed by one person, approved by another.';

    create table hold_reminders (
      plant_id bigint not null,
      hold_id bigint not null,
      audience text not null constraint hold_reminders_audience_check check (audience in ('quality_manager', 'director')),
      reminded_at timestamptz not null,
      primary key (hold_id, audience),
      constraint hold_reminders_hold_fkey foreign key (plant_id, hold_id) references holds (plant_id, id)
    );
    comment on table hold_reminders is 'That an open hold''s age was told of, once an audience.';

    create table outbox_attachments (
      id bigint generated always as identity primary key,
      outbox_id bigint not null constraint outbox_attachments_mail_fkey references outbox,
      file_name text not null,
      media_type text not null,
      content_id text,
      bytes bytea not null
    );
    create index outbox_attachments_mail_index on outbox_attachments (outbox_id);
    comment on table outbox_attachments is 'What goes with a mail; with a content id it is shown inline.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  const { rows } = await knex.raw<{ rows: { count: number }[] }>(
    'select count(*)::int as count from people where password_hash is null',
  );
  if (rows[0].count > 0)
    throw new Error(
      `${rows[0].count} invited people have no password yet: remove or invite them anew before going back.`,
    );
  await knex.raw(`
    drop table outbox_attachments, hold_reminders, specification_proposals, mail_subscriptions, person_tokens;
    alter table channels drop column retired_at;
    alter table gauges drop column retired_at;
    alter table characteristics drop column retired_at;
    alter table lines drop column retired_at;
    alter table products drop column value_per_unit, drop column retired_at;
    alter table plants drop column reminder_manager_hours, drop column reminder_director_hours, drop column allowance_notice_share,
      drop column allowance_cap_share, drop column currency;
    alter table people drop column theme, alter column password_hash set not null;
  `);
}
