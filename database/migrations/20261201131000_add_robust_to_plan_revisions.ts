import type { Knex } from 'knex';

/**
 * Whether a plan lets outlying lots pull its baseline less.
 * Why: the wish is stated when a draft is asked for, before the worker has its parameters; the parameters then freeze it.
 * Locks: plan_revisions, for a moment (a default that is not volatile rewrites nothing). Goes back: yes, drops the column.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table plan_revisions add column is_robust boolean not null default false;
    comment on column plan_revisions.is_robust is 'Whether lots are reweighted (bisquare) by their distance from the baseline fitted without them; asked for with the draft, frozen in the parameters.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`alter table plan_revisions drop column is_robust`);
}
