import type { Knex } from 'knex';
import type { Role } from '@app/contracts';

/** A plant with everything that its set-up pages would make. */
export interface PlantSeed {
  name: string;
  timeZone: string;
  /** Of the products' values; none stated without. */
  currency?: string;
  isDemo: boolean;
  at: Date;
  shifts: { name: string; startsAt: string; endsAt: string }[];
  people: { email: string; name: string; role: Role; lines: string[]; passwordHash: string }[];
  lines: {
    name: string;
    products: { code: string; name: string; valuePerUnit?: number }[];
    channels: {
      name: string;
      characteristic: { name: string; unit: string; resolution: number };
      gauge: { assetNumber: string; kind: string; position: string };
      specifications: Record<string, { nominal: number; lower: number | null; upper: number | null }>;
      appliesToIndividuals: boolean;
    }[];
  }[];
}

export interface SeededPlant {
  plantId: number;
  personIds: Map<string, number>;
  lineIds: Map<string, number>;
  /** By "line/channel". */
  channelIds: Map<string, number>;
}

const idOf = (inserted: unknown[]) => Number((inserted as { id: number }[])[0].id);

/** Makes the plant in one transaction. Specifications are proposed by the first engineer and approved by the first quality manager. */
export async function seedPlant(db: Knex, plant: PlantSeed): Promise<SeededPlant> {
  return db.transaction(async (tx) => {
    const plantId = idOf(
      await tx('plants')
        .insert({
          name: plant.name,
          time_zone: plant.timeZone,
          currency: plant.currency ?? null,
          is_demo: plant.isDemo,
          created_at: plant.at,
        })
        .returning('id'),
    );
    await seedShifts(tx, plantId, plant);
    const lineIds = new Map<string, number>();
    for (const line of plant.lines)
      lineIds.set(line.name, idOf(await tx('lines').insert({ plant_id: plantId, name: line.name }).returning('id')));
    const personIds = await seedPeople(tx, plantId, plant, lineIds);
    const signers = {
      proposed_by: personIds.get(plant.people.find((person) => person.role === 'engineer')?.email ?? ''),
      approved_by: personIds.get(plant.people.find((person) => person.role === 'quality_manager')?.email ?? ''),
    };
    const channelIds = new Map<string, number>();
    for (const line of plant.lines)
      await seedLine(tx, {
        plantId,
        line,
        lineId: lineIds.get(line.name) as number,
        channelIds,
        signers,
        at: plant.at,
      });
    return { plantId, personIds, lineIds, channelIds };
  });
}

async function seedShifts(tx: Knex.Transaction, plantId: number, plant: PlantSeed): Promise<void> {
  const minuteOf = (time: string) => Number(time.slice(0, 2)) * 60 + Number(time.slice(3, 5));
  for (const shift of plant.shifts) {
    const from = minuteOf(shift.startsAt);
    const to = minuteOf(shift.endsAt);
    const minutes = to > from ? `{[${from},${to})}` : `{[${from},1440),[0,${to})}`;
    await tx('shifts').insert({
      plant_id: plantId,
      name: shift.name,
      starts_at: shift.startsAt,
      ends_at: shift.endsAt,
      minutes,
      valid: '[2000-01-01,)',
    });
  }
}

async function seedPeople(
  tx: Knex.Transaction,
  plantId: number,
  plant: PlantSeed,
  lineIds: Map<string, number>,
): Promise<Map<string, number>> {
  const personIds = new Map<string, number>();
  for (const person of plant.people) {
    const id = idOf(
      await tx('people')
        .insert({
          email: person.email,
          name: person.name,
          password_hash: person.passwordHash,
          is_demo: plant.isDemo,
          created_at: plant.at,
        })
        .returning('id'),
    );
    personIds.set(person.email, id);
    await tx('memberships').insert({ plant_id: plantId, person_id: id, role: person.role });
    for (const line of person.lines)
      await tx('line_assignments').insert({ plant_id: plantId, line_id: lineIds.get(line), person_id: id });
  }
  return personIds;
}

interface LineSeed {
  plantId: number;
  line: PlantSeed['lines'][number];
  lineId: number;
  channelIds: Map<string, number>;
  signers: { proposed_by: number | undefined; approved_by: number | undefined };
  at: Date;
}

async function seedLine(
  tx: Knex.Transaction,
  { plantId, line, lineId, channelIds, signers, at }: LineSeed,
): Promise<void> {
  const since = `[${at.toISOString()},)`;
  const productIds = new Map<string, number>();
  for (const product of line.products) {
    const { code, name, valuePerUnit } = product;
    const row = { plant_id: plantId, code, name, value_per_unit: valuePerUnit ?? null };
    productIds.set(code, idOf(await tx('products').insert(row).returning('id')));
  }
  for (const channel of line.channels) {
    const characteristicId = await characteristicOf(tx, plantId, line.name, channel.characteristic);
    const channelId = idOf(
      await tx('channels')
        .insert({
          plant_id: plantId,
          line_id: lineId,
          characteristic_id: characteristicId,
          position: channel.gauge.position,
          name: channel.name,
        })
        .returning('id'),
    );
    channelIds.set(`${line.name}/${channel.name}`, channelId);
    const gaugeId = await gaugeOf(tx, plantId, channel.gauge);
    await tx('channel_gauges').insert({ plant_id: plantId, channel_id: channelId, gauge_id: gaugeId, served: since });
    for (const [code, { nominal, lower, upper }] of Object.entries(channel.specifications))
      await tx('specifications').insert({
        plant_id: plantId,
        product_id: productIds.get(code),
        characteristic_id: characteristicId,
        version: 1,
        nominal,
        lower,
        upper,
        applies_to_individuals: channel.appliesToIndividuals,
        valid: since,
        approved_at: at,
        ...signers,
      });
  }
}

/** A characteristic of the plant; where two lines have one of the same name in other units, the line's name tells them apart. */
async function characteristicOf(
  tx: Knex.Transaction,
  plantId: number,
  lineName: string,
  wanted: { name: string; unit: string; resolution: number },
): Promise<number> {
  for (const name of [wanted.name, `${wanted.name} (${lineName})`]) {
    const known = (await tx('characteristics').where({ plant_id: plantId, name }).first()) as
      { id: number; unit: string; resolution: number } | undefined;
    if (!known)
      return idOf(
        await tx('characteristics')
          .insert({ plant_id: plantId, ...wanted, name })
          .returning('id'),
      );
    if (known.unit === wanted.unit && known.resolution === wanted.resolution) return known.id;
  }
  throw new Error(`characteristic ${wanted.name} of ${lineName} clashes`);
}

async function gaugeOf(
  tx: Knex.Transaction,
  plantId: number,
  gauge: { assetNumber: string; kind: string },
): Promise<number> {
  const known = (await tx('gauges').where({ plant_id: plantId, asset_number: gauge.assetNumber }).first()) as
    { id: number } | undefined;
  if (known) return known.id;
  return idOf(
    await tx('gauges').insert({ plant_id: plantId, asset_number: gauge.assetNumber, kind: gauge.kind }).returning('id'),
  );
}

/** Drops the mails of a played past: nobody is sent last month's news. */
export async function discardWaitingMails(db: Knex, plantId: number): Promise<number> {
  const waiting = () => db('outbox').where({ plant_id: plantId, state: 'waiting' });
  await db('outbox_attachments').whereIn('outbox_id', waiting().select('id')).delete();
  return waiting().delete();
}
