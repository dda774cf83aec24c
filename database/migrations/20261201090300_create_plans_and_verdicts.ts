import type { Knex } from 'knex';

/**
 * Plans, breaks, exclusions; fits and the verdicts that came of them.
 * Why: a verdict must be reproducible years later, so plans are immutable once proposed and verdicts are only ever added.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception '% is append-only', tg_table_name using errcode = 'restrict_violation';
    end $$;

    create table breaks (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      at timestamptz not null,
      kind text not null constraint breaks_kind_check check (kind in ('adjustment', 'gauge_change', 'process_change')),
      reason text not null constraint breaks_reason_check check (length(trim(reason)) > 0),
      declared_by bigint not null constraint breaks_person_fkey references people,
      declared_at timestamptz not null,
      corrects_id bigint constraint breaks_corrects_key unique,
      is_withdrawn boolean not null default false,
      constraint breaks_channel_fkey foreign key (plant_id, channel_id) references channels (plant_id, id),
      constraint breaks_own_channel_key unique (channel_id, id),
      constraint breaks_corrects_fkey foreign key (channel_id, corrects_id) references breaks (channel_id, id),
      constraint breaks_withdrawn_check check (not is_withdrawn or corrects_id is not null)
    );
    create index breaks_channel_index on breaks (channel_id, at);
    create trigger breaks_append_only before update or delete or truncate on breaks for each statement execute function refuse_change();
    comment on table breaks is 'Instants at which a channel''s baseline starts afresh. Append-only: a correction names what it corrects; a withdrawn row corrects one away.';

    create table exclusions (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      reason text not null constraint exclusions_reason_check check (length(trim(reason)) > 0),
      excluded_by bigint not null constraint exclusions_person_fkey references people,
      excluded_at timestamptz not null,
      corrects_id bigint constraint exclusions_corrects_key unique,
      is_withdrawn boolean not null default false,
      constraint exclusions_lot_channel_fkey foreign key (plant_id, channel_id, lot_id) references lot_channels (plant_id, channel_id, lot_id),
      constraint exclusions_own_key unique (channel_id, lot_id, id),
      constraint exclusions_corrects_fkey foreign key (channel_id, lot_id, corrects_id) references exclusions (channel_id, lot_id, id),
      constraint exclusions_withdrawn_check check (not is_withdrawn or corrects_id is not null)
    );
    create index exclusions_channel_index on exclusions (channel_id, lot_id);
    create trigger exclusions_append_only before update or delete or truncate on exclusions for each statement execute function refuse_change();
    comment on table exclusions is 'Lots that do not pull the baseline by a person''s word, with the reason. Append-only.';

    create table plan_revisions (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      revision integer not null,
      state text not null constraint plan_revisions_state_check check (state in ('draft', 'proposed', 'in_force', 'retired')),
      reason text not null,
      parameters jsonb,
      report jsonb,
      failure text,
      drafted_by bigint not null constraint plan_revisions_drafter_fkey references people,
      drafted_at timestamptz not null,
      proposed_by bigint constraint plan_revisions_proposer_fkey references people,
      proposed_at timestamptz,
      approved_by bigint constraint plan_revisions_approver_fkey references people,
      approved_at timestamptz,
      retired_at timestamptz,
      constraint plan_revisions_channel_fkey foreign key (plant_id, channel_id) references channels (plant_id, id),
      constraint plan_revisions_key unique (plant_id, channel_id, id),
      constraint plan_revisions_revision_key unique (channel_id, revision),
      constraint plan_revisions_second_person check (approved_by <> proposed_by),
      constraint plan_revisions_frozen_check check (state in ('draft', 'retired') or (parameters is not null and proposed_by is not null and proposed_at is not null)),
      constraint plan_revisions_approved_check check (state <> 'in_force' or (approved_by is not null and approved_at is not null)),
      constraint plan_revisions_parameters_check check (parameters is null or jsonb_exists_all(parameters,
        array['shortestPeriodSeconds', 'effectivePeriodSeconds', 'windowSeconds', 'components', 'centre', 'scale', 'limit', 'referenceLotCount', 'constant', 'signals']))
    );
    create unique index plan_revisions_one_in_force on plan_revisions (channel_id) where state = 'in_force';
    create unique index plan_revisions_one_pending on plan_revisions (channel_id) where state in ('draft', 'proposed');
    create function keep_plan_revision() returns trigger language plpgsql as $$
    begin
      if tg_op = 'DELETE' then
        raise exception 'plan revisions are kept' using errcode = 'restrict_violation';
      end if;
      if old.state <> 'draft' and (new.parameters, new.report, new.revision, new.channel_id, new.plant_id, new.proposed_by, new.proposed_at, new.reason)
          is distinct from (old.parameters, old.report, old.revision, old.channel_id, old.plant_id, old.proposed_by, old.proposed_at, old.reason) then
        raise exception 'a plan revision cannot change once it is proposed' using errcode = 'restrict_violation';
      end if;
      if (old.state, new.state) not in (('draft', 'draft'), ('draft', 'proposed'), ('draft', 'retired'), ('proposed', 'proposed'), ('proposed', 'in_force'),
          ('proposed', 'retired'), ('in_force', 'in_force'), ('in_force', 'retired'), ('retired', 'retired')) then
        raise exception 'a plan revision cannot go from % to %', old.state, new.state using errcode = 'restrict_violation';
      end if;
      return new;
    end $$;
    create trigger plan_revisions_keep before update or delete on plan_revisions for each row execute function keep_plan_revision();
    comment on table plan_revisions is 'How a channel is judged; numbered revisions. Parameters are frozen when proposed: components, T_eff, centre, scale, limit.';

    create table fits (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      plan_revision_id bigint,
      intake_id bigint,
      segment_starts_at timestamptz,
      lambda double precision,
      kappa double precision,
      edf double precision,
      point_count integer,
      lot_count integer,
      movement double precision,
      start_level double precision,
      input_hash bytea not null,
      method_version text not null,
      judged_at timestamptz not null,
      constraint fits_channel_fkey foreign key (plant_id, channel_id) references channels (plant_id, id),
      constraint fits_plan_fkey foreign key (plant_id, channel_id, plan_revision_id) references plan_revisions (plant_id, channel_id, id),
      constraint fits_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id),
      constraint fits_key unique (plant_id, channel_id, id)
    );
    create index fits_channel_index on fits (channel_id, judged_at desc);
    create trigger fits_append_only before update or delete or truncate on fits for each statement execute function refuse_change();
    comment on table fits is 'One judging of a channel''s segment: by which plan revision, from which inputs, by which version of the method.';
    comment on column fits.segment_starts_at is 'The break that the segment starts at; null for what came before any break.';
    comment on column fits.start_level is 'Deviation from nominal that movements are counted from, in the unit; handed to the next fit of the segment.';
    comment on column fits.movement is 'Largest movement of the baseline since the segment''s start, in the characteristic''s unit.';

    create table baseline_points (
      plant_id bigint not null,
      channel_id bigint not null,
      at timestamptz not null,
      value double precision not null,
      standard_error double precision not null,
      fit_id bigint not null,
      primary key (channel_id, at),
      constraint baseline_points_fit_fkey foreign key (plant_id, channel_id, fit_id) references fits (plant_id, channel_id, id)
    );
    comment on table baseline_points is 'The baseline as last fitted, for drawing: deviation from nominal and its standard error, in the unit.';

    create table verdicts (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      fit_id bigint not null,
      is_current boolean not null,
      control_state text not null constraint verdicts_control_state_check
        check (control_state in ('within_control_limits', 'outside_control_limits', 'not_scored')),
      is_provisional boolean not null,
      not_scored_reason text,
      score double precision,
      score_limit double precision,
      residual double precision,
      residual_sd double precision,
      reading_count integer not null,
      lot_mean double precision,
      baseline double precision,
      control_low double precision,
      control_high double precision,
      specification_id bigint,
      specification_state text not null constraint verdicts_specification_state_check
        check (specification_state in ('inside_specification', 'inside_within_guard_band', 'outside_specification', 'no_specification')),
      constant_state text not null constraint verdicts_constant_state_check
        check (constant_state in ('within_control_limits', 'outside_control_limits', 'not_scored')),
      constant_low double precision,
      constant_high double precision,
      constant_score double precision,
      judged_at timestamptz not null,
      constraint verdicts_lot_channel_fkey foreign key (plant_id, channel_id, lot_id) references lot_channels (plant_id, channel_id, lot_id),
      constraint verdicts_specification_fkey foreign key (plant_id, specification_id) references specifications (plant_id, id),
      constraint verdicts_fit_fkey foreign key (plant_id, channel_id, fit_id) references fits (plant_id, channel_id, id),
      constraint verdicts_key unique (plant_id, channel_id, lot_id, id),
      constraint verdicts_plant_id_key unique (plant_id, id),
      constraint verdicts_score_check check ((control_state = 'not_scored') = (score is null)),
      constraint verdicts_finite_check check (score is null or (score > '-Infinity' and score < 'Infinity')),
      constraint verdicts_reason_check check ((control_state = 'not_scored') = (not_scored_reason is not null)),
      constraint verdicts_within_check check (control_state <> 'within_control_limits' or (score is not null and abs(score) <= score_limit)),
      constraint verdicts_constant_check check (constant_state <> 'within_control_limits' or constant_score is not null)
    );
    create unique index verdicts_one_current on verdicts (channel_id, lot_id) where is_current;
    create index verdicts_lot_index on verdicts (lot_id) where is_current;
    create index verdicts_provisional_index on verdicts (channel_id) where is_current and is_provisional;
    create index verdicts_fit_index on verdicts (fit_id);
    create function keep_verdict() returns trigger language plpgsql as $$
    begin
      if tg_op = 'UPDATE' and old.is_current and not new.is_current then
        new.is_current := true;
        if new is not distinct from old then
          new.is_current := false;
          return new;
        end if;
      end if;
      raise exception 'verdicts are only added; a current one may become a former one' using errcode = 'restrict_violation';
    end $$;
    create trigger verdicts_keep before update or delete on verdicts for each row execute function keep_verdict();
    create trigger verdicts_no_truncate before truncate on verdicts for each statement execute function refuse_change();
    comment on table verdicts is 'What was said of a lot on a channel, with its figures in the unit; one is current, former ones are kept.';
    comment on column verdicts.constant_state is 'What control limits on the unadjusted lot means would have said.';

    create table verdict_signals (
      plant_id bigint not null,
      verdict_id bigint not null,
      signal text not null constraint verdict_signals_signal_check
        check (signal in ('lot_mean', 'outside_specification', 'not_scored', 'censored_readings', 'baseline_moved')),
      action text not null constraint verdict_signals_action_check check (action in ('holds', 'notice', 'off')),
      facts jsonb not null,
      primary key (verdict_id, signal),
      constraint verdict_signals_verdict_fkey foreign key (plant_id, verdict_id) references verdicts (plant_id, id)
    );
    create trigger verdict_signals_append_only before update or delete or truncate on verdict_signals for each statement execute function refuse_change();
    comment on table verdict_signals is 'The reasons why a lot stands out, with the figures of the sentence.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table verdict_signals, verdicts, baseline_points, fits, plan_revisions, exclusions, breaks;
    drop function keep_verdict(), keep_plan_revision(), refuse_change();
  `);
}
