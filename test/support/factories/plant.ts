import type { Database } from '@app/data';
import { insertRow, LONG_AGO, since } from './insert';
import { insertPerson, type TestPerson } from './people';

export interface TestChannel {
  id: number;
  name: string;
  lineId: number;
  gaugeId: number;
  characteristicId: number;
  nominal: number;
  lower: number;
  upper: number;
  specificationId: number;
}

export interface TestPlant {
  id: number;
  /** Coater 2 and Calender 1. */
  lines: [{ id: number; name: string }, { id: number; name: string }];
  productId: number;
  /** On Coater 2: coat weight (60 ± 1.2 g/m²) and web thickness (25 ± 0.8 µm). */
  channels: [TestChannel, TestChannel];
  people: Record<'engineer' | 'engineer2' | 'manager' | 'lead' | 'technician' | 'director' | 'admin', TestPerson>;
}

const CHANNELS = [
  { name: 'Coat weight', unit: 'g/m²', resolution: 0.01, asset: 'BG-204', kind: 'beta gauge', nominal: 60, half: 1.2 },
  { name: 'Web thickness', unit: 'µm', resolution: 0.1, asset: 'LT-118', kind: 'laser gauge', nominal: 25, half: 0.8 },
];

const PEOPLE = {
  engineer: 'engineer',
  engineer2: 'engineer',
  manager: 'quality_manager',
  lead: 'line_lead',
  technician: 'technician',
  director: 'director',
  admin: 'administrator',
} as const;

/** A plant as an administrator would set it up; `domain` tells the people of several plants apart. */
export async function insertPlant(
  db: Database,
  { name = 'Marrowby Works', domain = 'marrowby.example', engineerMayRelease = false } = {},
): Promise<TestPlant> {
  const id = await insertRow(db, 'plants', {
    name,
    time_zone: 'Europe/London',
    engineer_may_release: engineerMayRelease,
    created_at: LONG_AGO,
  });
  await insertShifts(db, id);
  const lines = await Promise.all(
    ['Coater 2', 'Calender 1'].map(async (line) => ({
      id: await insertRow(db, 'lines', { plant_id: id, name: line }),
      name: line,
    })),
  );
  const productId = await insertRow(db, 'products', { plant_id: id, code: 'SEP-16', name: 'Separator 16' });
  const people = {} as TestPlant['people'];
  for (const [key, role] of Object.entries(PEOPLE))
    people[key as keyof typeof PEOPLE] = await insertPerson(db, {
      email: `${key}@${domain}`,
      plantId: id,
      roles: [role],
      lineIds: [lines[0].id],
    });
  const channels: TestChannel[] = [];
  for (const channel of CHANNELS)
    channels.push(await insertChannel(db, { plantId: id, lineId: lines[0].id, productId, by: people, ...channel }));
  return {
    id,
    lines: lines as TestPlant['lines'],
    productId,
    channels: channels as TestPlant['channels'],
    people,
  };
}

async function insertShifts(db: Database, plantId: number): Promise<void> {
  const shifts = [
    ['early', '06:00', '14:00', '{[360,840)}'],
    ['late', '14:00', '22:00', '{[840,1320)}'],
    ['night', '22:00', '06:00', '{[0,360),[1320,1440)}'],
  ];
  for (const [name, starts_at, ends_at, minutes] of shifts)
    await db('shifts').insert({ plant_id: plantId, name, starts_at, ends_at, minutes, valid: '[2020-01-01,)' });
}

export async function insertChannel(
  db: Database,
  channel: {
    plantId: number;
    lineId: number;
    productId: number;
    by: Pick<TestPlant['people'], 'engineer' | 'manager'>;
    name: string;
    unit: string;
    resolution: number;
    asset: string;
    kind: string;
    nominal: number;
    half: number;
  },
): Promise<TestChannel> {
  const { plantId, lineId, productId, name, nominal, half } = channel;
  const characteristicId = await insertRow(db, 'characteristics', {
    plant_id: plantId,
    name,
    unit: channel.unit,
    resolution: channel.resolution,
  });
  const [lower, upper] = [nominal - half, nominal + half];
  const specificationId = await insertRow(db, 'specifications', {
    plant_id: plantId,
    product_id: productId,
    characteristic_id: characteristicId,
    version: 1,
    nominal,
    lower,
    upper,
    valid: since(),
    proposed_by: channel.by.engineer.id,
    approved_by: channel.by.manager.id,
    approved_at: LONG_AGO,
  });
  const gaugeId = await insertRow(db, 'gauges', { plant_id: plantId, asset_number: channel.asset, kind: channel.kind });
  const id = await insertRow(db, 'channels', {
    plant_id: plantId,
    line_id: lineId,
    characteristic_id: characteristicId,
    position: 'A',
    name,
  });
  await db('channel_gauges').insert({ plant_id: plantId, channel_id: id, gauge_id: gaugeId, served: since() });
  return { id, name, lineId, gaugeId, characteristicId, nominal, lower, upper, specificationId };
}
