import type { Knex } from 'knex';

/**
 * Holds, their causes, and what people decided of them.
 * Why: at most one open hold a lot; a decision may cover many holds and parts of a lot, and says what its disposition requires.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table holds (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      line_id bigint not null,
      lot_id bigint not null,
      state text not null constraint holds_state_check check (state in ('open', 'decided')),
      opened_at timestamptz not null,
      is_late boolean not null,
      evidence_version integer not null default 1,
      constraint holds_lot_fkey foreign key (plant_id, line_id, lot_id) references lots (plant_id, line_id, id),
      constraint holds_plant_id_key unique (plant_id, id)
    );
    create unique index holds_one_open on holds (lot_id) where state = 'open';
    create index holds_state_index on holds (plant_id, state, opened_at);
    create index holds_lot_index on holds (lot_id);
    comment on table holds is 'A lot that may not move on until it is decided.';
    comment on column holds.evidence_version is 'Counts up with every new cause or verdict; a decision names the one it was taken on.';
    comment on column holds.is_late is 'The lot had been within its control limits before.';

    create table hold_causes (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      hold_id bigint not null,
      channel_id bigint not null,
      verdict_id bigint not null,
      intake_id bigint,
      signal text not null,
      sentence text not null,
      added_at timestamptz not null,
      constraint hold_causes_hold_fkey foreign key (plant_id, hold_id) references holds (plant_id, id),
      constraint hold_causes_verdict_fkey foreign key (plant_id, verdict_id) references verdicts (plant_id, id),
      constraint hold_causes_channel_fkey foreign key (plant_id, channel_id) references channels (plant_id, id),
      constraint hold_causes_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id),
      constraint hold_causes_key unique (hold_id, channel_id, signal)
    );
    create trigger hold_causes_append_only before update or delete or truncate on hold_causes for each statement execute function refuse_change();
    comment on table hold_causes is 'All that led to a hold: channel, signal and the sentence as it was said then.';
    comment on column hold_causes.intake_id is 'The intake whose scoring gave this cause; who confirmed it does not decide the hold.';

    create table set_asides (
      hold_id bigint primary key,
      plant_id bigint not null,
      place text,
      confirmed_by bigint not null constraint set_asides_person_fkey references people,
      confirmed_at timestamptz not null,
      constraint set_asides_hold_fkey foreign key (plant_id, hold_id) references holds (plant_id, id)
    );
    comment on table set_asides is 'The line lead''s word that a held lot physically stands apart.';

    create table decisions (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint decisions_plant_fkey references plants,
      reason text not null constraint decisions_reason_check check (length(trim(reason)) > 0),
      note text,
      decided_by bigint not null constraint decisions_person_fkey references people,
      printed_name text not null,
      meaning text not null,
      decided_at timestamptz not null,
      constraint decisions_plant_id_key unique (plant_id, id)
    );
    create trigger decisions_append_only before update or delete or truncate on decisions for each statement execute function refuse_change();
    comment on table decisions is 'A signature under one or more holds: printed name, time, and what it means.';

    create table decision_holds (
      plant_id bigint not null,
      decision_id bigint not null,
      hold_id bigint not null,
      evidence_version integer not null,
      primary key (decision_id, hold_id),
      constraint decision_holds_decision_fkey foreign key (plant_id, decision_id) references decisions (plant_id, id),
      constraint decision_holds_hold_fkey foreign key (plant_id, hold_id) references holds (plant_id, id),
      constraint decision_holds_hold_key unique (hold_id)
    );
    create trigger decision_holds_append_only before update or delete or truncate on decision_holds for each statement execute function refuse_change();
    create function refuse_own_intake() returns trigger language plpgsql as $$
    begin
      if exists (
        select 1 from hold_causes c join intakes i on i.id = c.intake_id join decisions d on d.id = new.decision_id
        where c.hold_id = new.hold_id and i.confirmed_by = d.decided_by
      ) then
        raise exception 'nobody decides a hold that came from an intake which they confirmed'
          using errcode = 'check_violation', constraint = 'decision_holds_not_own_intake';
      end if;
      return new;
    end $$;
    create trigger decision_holds_not_own_intake before insert on decision_holds for each row execute function refuse_own_intake();
    comment on table decision_holds is 'Which holds a decision ends, and the evidence it was taken on.';

    create table decision_parts (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      decision_id bigint not null,
      hold_id bigint not null,
      disposition text not null constraint decision_parts_disposition_check
        check (disposition in ('release', 'scrap', 'rework', 'concession', 'regrade')),
      quantity double precision constraint decision_parts_quantity_check check (quantity > 0),
      concession_quantity double precision,
      concession_expires_at timestamptz,
      allowed_by text,
      regrade_product_id bigint,
      constraint decision_parts_decision_fkey foreign key (decision_id, hold_id) references decision_holds (decision_id, hold_id),
      constraint decision_parts_plant_fkey foreign key (plant_id, hold_id) references holds (plant_id, id),
      constraint decision_parts_product_fkey foreign key (plant_id, regrade_product_id) references products (plant_id, id),
      constraint decision_parts_concession_check check (disposition <> 'concession'
        or ((concession_quantity is not null or concession_expires_at is not null) and allowed_by is not null)),
      constraint decision_parts_regrade_check check ((disposition = 'regrade') = (regrade_product_id is not null))
    );
    create index decision_parts_hold_index on decision_parts (hold_id);
    create trigger decision_parts_append_only before update or delete or truncate on decision_parts for each statement execute function refuse_change();
    create function check_decision_parts() returns trigger language plpgsql as $$
    declare
      whole double precision;
      parts integer;
      total double precision;
      missing integer;
    begin
      select l.quantity into whole from holds h join lots l on l.id = h.lot_id where h.id = new.hold_id;
      select count(*), sum(p.quantity), count(*) filter (where p.quantity is null) into parts, total, missing
        from decision_parts p where p.decision_id = new.decision_id and p.hold_id = new.hold_id;
      if parts = 0 or (whole is null and (parts <> 1 or missing <> 1))
          or (whole is not null and (missing > 0 or abs(total - whole) > 1e-9 * whole)) then
        raise exception 'the parts of a decision must sum to the lot''s quantity'
          using errcode = 'check_violation', constraint = 'decision_parts_sum_check';
      end if;
      return null;
    end $$;
    create constraint trigger decision_parts_sum_check after insert on decision_parts
      deferrable initially deferred for each row execute function check_decision_parts();
    create constraint trigger decision_holds_sum_check after insert on decision_holds
      deferrable initially deferred for each row execute function check_decision_parts();
    comment on table decision_parts is 'What becomes of each part of a lot; the parts sum to the lot''s quantity.';

    create table attachments (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      hold_id bigint not null,
      file_name text not null,
      media_type text not null,
      sha256 bytea not null,
      bytes bytea not null,
      added_by bigint not null constraint attachments_person_fkey references people,
      added_at timestamptz not null,
      constraint attachments_hold_fkey foreign key (plant_id, hold_id) references holds (plant_id, id)
    );
    create trigger attachments_append_only before update or delete or truncate on attachments for each statement execute function refuse_change();
    comment on table attachments is 'Evidence added to a hold.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table attachments, decision_parts, decision_holds, decisions, set_asides, hold_causes, holds;
    drop function check_decision_parts(), refuse_own_intake();
  `);
}
