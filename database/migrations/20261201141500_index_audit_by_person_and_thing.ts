import type { Knex } from 'knex';

/**
 * Indexes for reading the audit trail by person and by kind of thing, newest first.
 * Why: a plant's trail grows by thousands of entries a week and is filtered by these two.
 * Locks: audit_entries against writing while the indexes are built. Goes back: yes.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create index audit_entries_actor_index on audit_entries (plant_id, actor_id, at desc, id desc);
    create index audit_entries_kind_index on audit_entries (plant_id, thing_kind, at desc, id desc);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop index audit_entries_actor_index, audit_entries_kind_index;`);
}
