import type { Knex } from 'knex';

/**
 * What a workbook would change, readings that supersede others, and intakes that are withdrawn.
 * Why: a corrected workbook takes the place of what was stored, and a wrong one is taken back; either way what was there is kept.
 * Locks: intakes, readings, lots and holds for a moment, and readings against writing while its identity index is made
 * anew (some seconds a million readings). Goes back: only while nothing was superseded or withdrawn.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table intakes
      add column comparison jsonb,
      add column differing text not null default 'keep' constraint intakes_differing_check check (differing in ('keep', 'supersede')),
      add column rows_superseding bigint not null default 0,
      add column readings_superseding bigint not null default 0,
      add column settled_changes jsonb,
      add column withdrawn_by bigint constraint intakes_withdrawer_fkey references people,
      add column withdrawn_at timestamptz,
      add column withdrawal_reason text constraint intakes_withdrawal_reason_check check (length(trim(withdrawal_reason)) > 0),
      drop constraint intakes_state_check,
      drop constraint intakes_rows_check,
      add constraint intakes_state_check
        check (state in ('received', 'needs_attention', 'queued', 'working', 'scored', 'refused', 'withdrawn')),
      add constraint intakes_rows_check
        check (readings_stored_at is null or rows_read = rows_used + rows_already_there + rows_superseding + rows_not_used),
      add constraint intakes_withdrawn_check check ((state = 'withdrawn') = (withdrawn_at is not null)
        and (withdrawn_at is null) = (withdrawn_by is null) and (withdrawn_at is null) = (withdrawal_reason is null));
    comment on column intakes.rows_read is
      'Data rows of the workbook = used + already there + superseding + not used, once its readings are stored.';
    comment on column intakes.comparison is 'IntakeComparison: what confirming would do, by what was stored when it was read or last looked at.';
    comment on column intakes.differing is 'Where a stored reading has another value: it is kept, or the workbook''s supersedes it.';
    comment on column intakes.rows_superseding is 'Rows of which a reading took the place of one stored before.';
    comment on column intakes.readings_superseding is 'Readings that took the place of others; a part of readings_stored.';
    comment on column intakes.settled_changes is
      'Settled verdicts that would be another one by its readings, as found after its scoring: [{channelId, lotId, verdictId, now, would}].';

    alter table readings
      add column withdrawn_at timestamptz,
      alter constraint readings_superseder_fkey deferrable initially immediate;
    drop index readings_identity_key;
    create unique index readings_identity_key on readings (channel_id, measured_at, lot_id, serial, position, occurrence)
      where superseded_by is null and withdrawn_at is null;
    create index readings_out_of_force_index on readings (channel_id, lot_id) where superseded_by is not null or withdrawn_at is not null;
    comment on table readings is 'One value of one channel at one instant in one lot. Never changed but for superseded_by and withdrawn_at.';
    comment on column readings.superseded_by is 'The reading of a corrected workbook that stands in its place.';
    comment on column readings.withdrawn_at is 'When its intake was withdrawn; it counts for nothing since.';

    alter table lots add column withdrawn_at timestamptz;
    comment on column lots.withdrawn_at is 'When the last intake that had brought readings of it was withdrawn; null again as soon as another brings some.';

    create table lots_to_rejudge (
      plant_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      because text not null constraint lots_to_rejudge_because_check check (because in ('added', 'superseded', 'withdrawn', 'asked')),
      primary key (channel_id, lot_id),
      constraint lots_to_rejudge_lot_channel_fkey foreign key (plant_id, channel_id, lot_id) references lot_channels (plant_id, channel_id, lot_id)
    );
    comment on table lots_to_rejudge is 'Lots at which the next judging of the channel looks although their verdict is settled: readings were added or superseded, an intake was withdrawn since that verdict, or a person asked. Written and removed with the channel locked.';

    alter table holds
      add column withdrawn_at timestamptz,
      add column withdrawn_intake_id bigint,
      add constraint holds_withdrawn_intake_fkey foreign key (plant_id, withdrawn_intake_id) references intakes (plant_id, id),
      drop constraint holds_state_check,
      add constraint holds_state_check check (state in ('open', 'decided', 'withdrawn')),
      add constraint holds_withdrawn_check check ((state = 'withdrawn') = (withdrawn_at is not null)
        and (withdrawn_at is null) = (withdrawn_intake_id is null));
    comment on column holds.withdrawn_intake_id is 'The withdrawn intake with which all that led to the hold went away: it ended without anybody''s decision.';

    create table intake_reliances (
      plant_id bigint not null,
      intake_id bigint not null,
      earlier_intake_id bigint not null,
      readings bigint not null,
      primary key (intake_id, earlier_intake_id),
      constraint intake_reliances_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id),
      constraint intake_reliances_earlier_fkey foreign key (plant_id, earlier_intake_id) references intakes (plant_id, id)
    );
    create index intake_reliances_earlier_index on intake_reliances (earlier_intake_id);
    comment on table intake_reliances is 'How many readings of an intake were not stored because those of an earlier one were there: without it they would be missing.';

    create table intake_quantities (
      plant_id bigint not null,
      intake_id bigint not null,
      lot_id bigint not null,
      quantity double precision not null constraint intake_quantities_check check (quantity > 0),
      quantity_unit text not null,
      primary key (lot_id, intake_id),
      constraint intake_quantities_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id),
      constraint intake_quantities_lot_fkey foreign key (plant_id, lot_id) references lots (plant_id, id)
    );
    create index intake_quantities_intake_index on intake_quantities (intake_id);
    comment on table intake_quantities is 'The quantity that an intake says a lot has; of several the first is the lot''s.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    do $$ begin
      if exists (select 1 from readings where superseded_by is not null or withdrawn_at is not null)
        or exists (select 1 from intakes where state = 'withdrawn') or exists (select 1 from holds where state = 'withdrawn') then
        raise exception 'readings were superseded or intakes withdrawn; without these columns they would count again';
      end if;
    end $$;
    drop table intake_quantities, intake_reliances, lots_to_rejudge;
    alter table holds
      drop constraint holds_withdrawn_check, drop constraint holds_state_check,
      add constraint holds_state_check check (state in ('open', 'decided')),
      drop column withdrawn_intake_id, drop column withdrawn_at;
    alter table lots drop column withdrawn_at;
    drop index readings_out_of_force_index, readings_identity_key;
    create unique index readings_identity_key on readings (channel_id, measured_at, lot_id, serial, position, occurrence)
      where superseded_by is null;
    alter table readings alter constraint readings_superseder_fkey not deferrable, drop column withdrawn_at;
    comment on table readings is 'One value of one channel at one instant in one lot. Never changed but for superseded_by.';
    alter table intakes
      drop constraint intakes_withdrawn_check, drop constraint intakes_rows_check, drop constraint intakes_state_check,
      add constraint intakes_state_check check (state in ('received', 'needs_attention', 'queued', 'working', 'scored', 'refused')),
      add constraint intakes_rows_check check (readings_stored_at is null or rows_read = rows_used + rows_already_there + rows_not_used),
      drop column withdrawal_reason, drop column withdrawn_at, drop column withdrawn_by, drop column settled_changes,
      drop column readings_superseding, drop column rows_superseding, drop column differing, drop column comparison;
    comment on column intakes.rows_read is 'Data rows of the workbook = used + already there + not used, once its readings are stored.';
  `);
}
