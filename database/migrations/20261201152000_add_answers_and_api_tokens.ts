import type { Knex } from 'knex';

/**
 * What a person answers about a workbook, what was remembered of a line's layouts, and tokens for machines that send workbooks.
 * Why: an answer has to outlive the reading that asked for it; a line computer has no password.
 * Locks: intakes for a moment (a column with a constant default is not written to the rows). Goes back: yes; answers and tokens are then gone.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table intakes
      add column answers jsonb not null default '{}',
      add column confirms_itself boolean not null default false;
    comment on column intakes.answers is 'What a person answered about how it is to be read: WorkbookAnswers.';
    comment on column intakes.confirms_itself is 'Asked at upload: it is confirmed for its receiver as soon as it is read, if its layouts are remembered and nothing is left to say.';

    create table api_tokens (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint api_tokens_plant_fkey references plants,
      person_id bigint not null constraint api_tokens_person_fkey references people,
      name text not null constraint api_tokens_name_check check (length(name) between 1 and 120),
      token_hash bytea not null constraint api_tokens_hash_key unique,
      created_at timestamptz not null,
      last_used_at timestamptz,
      revoked_at timestamptz
    );
    create index api_tokens_person_index on api_tokens (person_id, plant_id);
    comment on table api_tokens is 'Tokens by which a script or line computer sends workbooks as a quality engineer of one plant. Only the hash is kept.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table api_tokens;
    alter table intakes drop column confirms_itself, drop column answers;
  `);
}
