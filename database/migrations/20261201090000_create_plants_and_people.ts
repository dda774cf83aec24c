import type { Knex } from 'knex';

/**
 * Plants, their lines and shift calendar; people, what they may do where, and how they are signed in.
 * Why: everything else hangs on a plant, and every foreign key below carries it, so that a row can never point into another plant.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create extension if not exists btree_gist;

    create table plants (
      id bigint generated always as identity primary key,
      name text not null constraint plants_name_key unique,
      time_zone text not null,
      engineer_may_release boolean not null default false,
      is_demo boolean not null default false,
      created_at timestamptz not null
    );
    comment on table plants is 'A site. Someone who is nobody at a plant sees nothing of it.';
    comment on column plants.time_zone is 'IANA name; all wall-clock times of the plant are in it.';
    comment on column plants.engineer_may_release is 'Whether engineers may release lots held for control limits alone.';

    create table lines (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint lines_plant_fkey references plants,
      name text not null,
      constraint lines_plant_id_key unique (plant_id, id),
      constraint lines_name_key unique (plant_id, name)
    );
    comment on table lines is 'One production line of a plant.';

    create table shifts (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint shifts_plant_fkey references plants,
      name text not null,
      starts_at time not null,
      ends_at time not null,
      minutes int4multirange not null constraint shifts_minutes_check check (not isempty(minutes)),
      valid daterange not null,
      constraint shifts_no_overlap exclude using gist (plant_id with =, valid with &&, minutes with &&)
    );
    comment on table shifts is 'The shift calendar: a span of the day in the plant''s zone, within a range of dates; spans never overlap.';
    comment on column shifts.minutes is 'The span as minutes of the day, min; a night shift has two pieces.';

    create table people (
      id bigint generated always as identity primary key,
      email text not null constraint people_email_lower check (email = lower(email)),
      name text not null,
      password_hash text not null,
      is_demo boolean not null default false,
      disabled_at timestamptz,
      created_at timestamptz not null,
      constraint people_email_key unique (email)
    );
    comment on table people is 'A person who may sign in.';

    create table memberships (
      plant_id bigint not null constraint memberships_plant_fkey references plants,
      person_id bigint not null constraint memberships_person_fkey references people,
      role text not null constraint memberships_role_check
        check (role in ('engineer', 'quality_manager', 'technician', 'line_lead', 'director', 'administrator')),
      primary key (plant_id, person_id, role)
    );
    create index memberships_person_index on memberships (person_id);
    comment on table memberships is 'The roles that a person has at a plant.';

    create table line_assignments (
      plant_id bigint not null,
      line_id bigint not null,
      person_id bigint not null constraint line_assignments_person_fkey references people,
      primary key (line_id, person_id),
      constraint line_assignments_line_fkey foreign key (plant_id, line_id) references lines (plant_id, id)
    );
    comment on table line_assignments is 'Mail about a line goes to the people assigned to it.';

    create table refresh_sessions (
      id bigint generated always as identity primary key,
      person_id bigint not null constraint refresh_sessions_person_fkey references people,
      family uuid not null,
      token_hash bytea not null constraint refresh_sessions_token_key unique,
      issued_at timestamptz not null,
      expires_at timestamptz not null,
      used_at timestamptz,
      revoked_at timestamptz
    );
    create index refresh_sessions_family_index on refresh_sessions (family);
    create index refresh_sessions_person_index on refresh_sessions (person_id);
    comment on table refresh_sessions is 'One row a refresh token ever given; a token used twice ends its whole family.';

    create table api_tokens (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint api_tokens_plant_fkey references plants,
      person_id bigint not null constraint api_tokens_person_fkey references people,
      name text not null,
      token_hash bytea not null constraint api_tokens_token_key unique,
      created_at timestamptz not null,
      last_used_at timestamptz,
      revoked_at timestamptz
    );
    comment on table api_tokens is 'Tokens for scripts and line computers, kept as hashes.';

    create table sign_in_failures (
      subject text primary key,
      failures integer not null,
      blocked_until timestamptz,
      last_failed_at timestamptz not null
    );
    comment on table sign_in_failures is 'Wrong passwords in a row, an account and an address each; five of them delay the next try.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table sign_in_failures, api_tokens, refresh_sessions, line_assignments, memberships, people, shifts, lines, plants;
  `);
}
