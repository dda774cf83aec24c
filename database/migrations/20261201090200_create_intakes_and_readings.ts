import type { Knex } from 'knex';

/**
 * A workbook on its way, the lots and readings that it brings.
 * Why: bytes are kept whole; readings carry an identity that makes a repeated upload change nothing.
 * Readings are kept ten years: no wide index, the identity index serves the look-ups by channel and time, and what a lot's readings
 * come to is kept in lot_channels, so that judging and long records never read the raw rows.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table intakes (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      line_id bigint not null,
      layout_id bigint,
      state text not null constraint intakes_state_check
        check (state in ('received', 'needs_attention', 'queued', 'working', 'scored', 'refused')),
      file_name text not null,
      byte_count bigint not null,
      sha256 bytea not null,
      report jsonb,
      failure text,
      rows_read bigint not null default 0,
      rows_used bigint not null default 0,
      rows_already_there bigint not null default 0,
      rows_not_used bigint not null default 0,
      readings_stored bigint not null default 0,
      readings_already_there bigint not null default 0,
      received_by bigint not null constraint intakes_receiver_fkey references people,
      received_at timestamptz not null,
      read_at timestamptz,
      confirmed_by bigint constraint intakes_confirmer_fkey references people,
      confirmed_at timestamptz,
      readings_stored_at timestamptz,
      channel_ids bigint[],
      lot_ids bigint[],
      lots_scored integer,
      scored_at timestamptz,
      constraint intakes_line_fkey foreign key (plant_id, line_id) references lines (plant_id, id),
      constraint intakes_layout_fkey foreign key (plant_id, layout_id) references layouts (plant_id, id),
      constraint intakes_plant_id_key unique (plant_id, id),
      constraint intakes_confirmed_check check ((confirmed_by is null) = (confirmed_at is null)),
      constraint intakes_progress_check check (state not in ('queued', 'working', 'scored') or confirmed_at is not null),
      constraint intakes_scored_check check (state <> 'scored' or (scored_at is not null and readings_stored_at is not null)),
      constraint intakes_rows_check check (readings_stored_at is null or rows_read = rows_used + rows_already_there + rows_not_used)
    );
    create index intakes_line_index on intakes (line_id, received_at desc);
    create index intakes_sha256_index on intakes (plant_id, sha256);
    comment on table intakes is 'An uploaded workbook on its way.';
    comment on column intakes.report is 'What was recognised: columns, lots, first rows, as read.';
    comment on column intakes.rows_read is 'Data rows of the workbook = used + already there + not used, once its readings are stored.';

    comment on column intakes.lot_ids is 'Lots to which it brought new readings; set with readings_stored_at.';
    comment on column intakes.lots_scored is 'How many of these had a score on any channel when it was scored.';
    comment on column intakes.channel_ids is 'Channels on which it brought new readings; set with readings_stored_at.';

    create table intake_bytes (
      intake_id bigint primary key,
      plant_id bigint not null,
      bytes bytea not null,
      constraint intake_bytes_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id)
    );
    alter table intake_bytes alter column bytes set storage external;
    comment on table intake_bytes is 'The workbook itself, as uploaded.';

    create table intake_problems (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      intake_id bigint not null,
      sheet text not null,
      "row" integer,
      "column" text,
      code text not null,
      detail text not null,
      severity text not null constraint intake_problems_severity_check
        check (severity in ('blocking', 'row_not_used', 'cell_not_used', 'notice')),
      constraint intake_problems_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id)
    );
    create index intake_problems_intake_index on intake_problems (intake_id);
    comment on table intake_problems is 'What could not be used of a workbook, where, why and what to do.';

    create table staged_readings (
      intake_id bigint not null,
      plant_id bigint not null,
      ordinal bigint not null,
      sheet text not null,
      "row" integer not null,
      "column" text not null,
      lot text not null,
      product text,
      quantity double precision,
      quantity_unit text,
      channel_id bigint not null,
      measured_at timestamptz not null,
      value double precision,
      censoring text,
      serial text,
      position text,
      primary key (intake_id, ordinal),
      constraint staged_readings_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id)
    );
    comment on table staged_readings is 'Readings as read from a workbook, until its intake is scored or refused; they can be read again from the bytes.';

    create table lots (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      line_id bigint not null,
      number text not null,
      run smallint not null default 1,
      product_id bigint not null,
      quantity double precision constraint lots_quantity_check check (quantity > 0),
      quantity_unit text,
      starts_at timestamptz not null,
      ends_at timestamptz not null,
      constraint lots_line_fkey foreign key (plant_id, line_id) references lines (plant_id, id),
      constraint lots_product_fkey foreign key (plant_id, product_id) references products (plant_id, id),
      constraint lots_plant_id_key unique (plant_id, id),
      constraint lots_line_id_key unique (plant_id, line_id, id),
      constraint lots_number_key unique (line_id, number, run),
      constraint lots_span_check check (starts_at <= ends_at),
      constraint lots_unit_check check (quantity is null or quantity_unit is not null)
    );
    create index lots_time_index on lots (line_id, starts_at);
    comment on table lots is 'The quantity released or held as one (ISO 3534-2). A reworked lot comes back as its next measurement run.';

    create table lot_channels (
      plant_id bigint not null,
      line_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      count integer not null default 0,
      censored_low integer not null default 0,
      censored_high integer not null default 0,
      first_at timestamptz,
      last_at timestamptz,
      mean_at timestamptz,
      mean double precision,
      sum_squares double precision,
      minimum double precision,
      maximum double precision,
      count_below integer not null default 0,
      count_above integer not null default 0,
      specification_id bigint,
      blocks jsonb,
      primary key (channel_id, lot_id),
      constraint lot_channels_key unique (plant_id, channel_id, lot_id),
      constraint lot_channels_specification_fkey foreign key (plant_id, specification_id) references specifications (plant_id, id),
      constraint lot_channels_channel_fkey foreign key (plant_id, line_id, channel_id) references channels (plant_id, line_id, id),
      constraint lot_channels_lot_fkey foreign key (plant_id, line_id, lot_id) references lots (plant_id, line_id, id)
    );
    create index lot_channels_time_index on lot_channels (channel_id, first_at);
    create index lot_channels_lot_index on lot_channels (lot_id);
    comment on table lot_channels is 'What a lot''s active readings on a channel come to; worked out again whenever one of them changes.';
    comment on column lot_channels.sum_squares is 'Sum of squared deviations of the readings from their mean, unit squared.';
    comment on column lot_channels.blocks is 'Sixteen equal time blocks from first_at to last_at: [{index, at (s), count, mean, sumSquares}], empty blocks absent.';

    create table intake_lots (
      plant_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      intake_id bigint not null,
      constraint intake_lots_key primary key (plant_id, channel_id, lot_id, intake_id),
      constraint intake_lots_lot_channel_fkey foreign key (plant_id, channel_id, lot_id) references lot_channels (plant_id, channel_id, lot_id),
      constraint intake_lots_intake_fkey foreign key (plant_id, intake_id) references intakes (plant_id, id)
    );
    create index intake_lots_intake_index on intake_lots (intake_id);
    comment on table intake_lots is 'To which lots on which channels an intake brought readings. A reading refers to its row: one look instead of one at the lot and one at the intake.';

    create table readings (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      lot_id bigint not null,
      intake_id bigint not null,
      measured_at timestamptz not null,
      value double precision,
      censoring text constraint readings_censoring_check check (censoring in ('below', 'above')),
      occurrence integer not null,
      serial text not null default '',
      position text not null default '',
      superseded_by bigint constraint readings_superseder_fkey references readings,
      constraint readings_intake_lot_fkey foreign key (plant_id, channel_id, lot_id, intake_id) references intake_lots (plant_id, channel_id, lot_id, intake_id),
      constraint readings_value_or_censoring check ((value is null) <> (censoring is null)),
      constraint readings_finite_check check (value is null or (value > '-Infinity' and value < 'Infinity'))
    );
    create unique index readings_identity_key on readings (channel_id, measured_at, lot_id, serial, position, occurrence)
      where superseded_by is null;
    comment on table readings is 'One value of one channel at one instant in one lot. Never changed but for superseded_by.';
    comment on column readings.occurrence is 'Number among readings of equal stamp, lot, serial and position, by the order of rows; 1 where a serial or position tells them apart.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table readings, intake_lots, lot_channels, lots, staged_readings, intake_problems, intake_bytes, intakes;
  `);
}
