import type { Knex } from 'knex';

/**
 * What a person answers about how a workbook is to be read, whether it confirms itself, and the look-up of a person's API tokens.
 * Why: an answer has to outlive the reading that asked for it.
 * Locks: intakes for a moment (a column with a constant default is not written to the rows). Goes back: yes; answers are then gone.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table intakes
      add column answers jsonb not null default '{}',
      add column confirms_itself boolean not null default false;
    comment on column intakes.answers is 'What a person answered about how it is to be read: WorkbookAnswers.';
    comment on column intakes.confirms_itself is 'Asked at upload: it is confirmed for its receiver as soon as it is read, if its layouts are remembered and nothing is left to say.';

    create index api_tokens_person_index on api_tokens (person_id, plant_id);
    comment on table api_tokens is 'Tokens by which a script or line computer sends workbooks as a quality engineer of one plant. Only the hash is kept.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop index api_tokens_person_index;
    alter table intakes drop column confirms_itself, drop column answers;
  `);
}
