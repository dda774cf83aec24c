import type { Knex } from 'knex';

/**
 * What is measured, with what, against which specification.
 * Why: the channel (line, position, characteristic) is the unit that has a baseline, a plan and control limits.
 * Locks: nothing, the tables are new. Goes back: yes, drops them.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table products (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint products_plant_fkey references plants,
      code text not null,
      name text not null,
      constraint products_plant_id_key unique (plant_id, id),
      constraint products_code_key unique (plant_id, code)
    );
    comment on table products is 'What a lot is made of.';

    create table characteristics (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint characteristics_plant_fkey references plants,
      name text not null,
      unit text not null,
      resolution double precision not null constraint characteristics_resolution_check check (resolution > 0),
      constraint characteristics_plant_id_key unique (plant_id, id),
      constraint characteristics_name_key unique (plant_id, name)
    );
    comment on table characteristics is 'What is measured (ISO 3534-2).';
    comment on column characteristics.resolution is 'Smallest step of an indication, in the unit.';

    create table specifications (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      product_id bigint not null,
      characteristic_id bigint not null,
      version integer not null,
      nominal double precision not null,
      lower double precision,
      upper double precision,
      applies_to_individuals boolean not null default true,
      valid tstzrange not null,
      proposed_by bigint not null constraint specifications_proposer_fkey references people,
      approved_by bigint not null constraint specifications_approver_fkey references people,
      approved_at timestamptz not null,
      constraint specifications_product_fkey foreign key (plant_id, product_id) references products (plant_id, id),
      constraint specifications_characteristic_fkey foreign key (plant_id, characteristic_id) references characteristics (plant_id, id),
      constraint specifications_plant_id_key unique (plant_id, id),
      constraint specifications_version_key unique (product_id, characteristic_id, version),
      constraint specifications_limits_check check (lower < upper and (lower is not null or upper is not null)),
      constraint specifications_second_person check (approved_by <> proposed_by),
      constraint specifications_no_overlap exclude using gist (product_id with =, characteristic_id with =, valid with &&)
    );
    comment on table specifications is 'Nominal value and specification limits of a product and characteristic, in the characteristic''s unit; one version at a time.';
    comment on column specifications.applies_to_individuals is 'Every reading is compared with the limits, not only the lot mean.';

    create table gauges (
      id bigint generated always as identity primary key,
      plant_id bigint not null constraint gauges_plant_fkey references plants,
      asset_number text not null,
      kind text not null,
      constraint gauges_plant_id_key unique (plant_id, id),
      constraint gauges_asset_number_key unique (plant_id, asset_number)
    );
    comment on table gauges is 'A measuring instrument with its asset number.';

    create table channels (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      line_id bigint not null,
      characteristic_id bigint not null,
      position text not null,
      name text not null,
      inputs_version bigint not null default 0,
      constraint channels_line_fkey foreign key (plant_id, line_id) references lines (plant_id, id),
      constraint channels_characteristic_fkey foreign key (plant_id, characteristic_id) references characteristics (plant_id, id),
      constraint channels_plant_id_key unique (plant_id, id),
      constraint channels_line_id_key unique (plant_id, line_id, id),
      constraint channels_name_key unique (line_id, name),
      constraint channels_place_key unique (line_id, position, characteristic_id)
    );
    comment on table channels is 'One gauge position measuring one characteristic on one line.';
    comment on column channels.inputs_version is 'Counts up with every change of what judging reads (readings, breaks, exclusions, decisions, plans), so that a judgement made from older inputs is not recorded.';

    create table channel_gauges (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      channel_id bigint not null,
      gauge_id bigint not null,
      served tstzrange not null constraint channel_gauges_served_check check (not isempty(served)),
      constraint channel_gauges_channel_fkey foreign key (plant_id, channel_id) references channels (plant_id, id),
      constraint channel_gauges_gauge_fkey foreign key (plant_id, gauge_id) references gauges (plant_id, id),
      constraint channel_gauges_no_overlap exclude using gist (channel_id with =, served with &&)
    );
    comment on table channel_gauges is 'Which gauge served a channel when; one at a time.';

    create table layouts (
      id bigint generated always as identity primary key,
      plant_id bigint not null,
      line_id bigint not null,
      fingerprint bytea not null,
      reading jsonb not null,
      remembered_at timestamptz not null,
      remembered_by bigint not null constraint layouts_person_fkey references people,
      constraint layouts_line_fkey foreign key (plant_id, line_id) references lines (plant_id, id),
      constraint layouts_plant_id_key unique (plant_id, id),
      constraint layouts_fingerprint_key unique (line_id, fingerprint)
    );
    comment on table layouts is 'How a header was understood on a line, by the header''s fingerprint.';
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table layouts, channel_gauges, channels, gauges, specifications, characteristics, products;
  `);
}
