import type { Knex } from 'knex';

/**
 * Lets a mail be of no plant.
 * Why: whoever has a password but no role at any plant (the first administrator before the first plant, a person whose roles were taken
 * away) must get the link for a new password too.
 * Locks: outbox for a moment. Goes back: yes, without the mails of no plant; their links can be asked for again.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table outbox alter column plant_id drop not null;
    comment on column outbox.plant_id is 'Null: of no plant, since the recipient has a role at none; on no plant''s page of mails.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    delete from outbox_attachments where outbox_id in (select id from outbox where plant_id is null);
    delete from outbox where plant_id is null;
    comment on column outbox.plant_id is null;
    alter table outbox alter column plant_id set not null;
  `);
}
