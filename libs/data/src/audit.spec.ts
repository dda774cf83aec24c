import { randomBytes } from 'node:crypto';
import { insertAuditEntry } from './audit';
import { createDatabase, type Database } from './database';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const REFUSED = /append-only/;

describe('an audit entry', () => {
  let place: PlantDatabase;
  const at = new Date('2026-03-11T08:00:00.123Z');
  const CHANGES = {
    update: `update audit_entries set sentence = 'nothing happened'`,
    'update of its times': `update audit_entries set at = now(), recorded_at = now()`,
    'update of no row': `update audit_entries set at = now() where false`,
    delete: `delete from audit_entries`,
    truncate: `truncate audit_entries`,
    'truncate by way of people': `truncate people cascade`,
    'insert that updates': `insert into audit_entries (id, at, actor_name, action, thing_kind, thing_id, sentence)
      overriding system value select id, now(), 'x', 'x', 'x', 1, 'x' from audit_entries on conflict (id) do update set sentence = 'x'`,
  };

  beforeAll(async () => {
    place = await openPlantDatabase();
    await place.db.transaction((tx) =>
      insertAuditEntry(tx, {
        plantId: place.plant.id,
        at,
        actor: { ...place.plant.people.manager, address: '192.0.2.7' },
        action: 'release',
        thingKind: 'hold',
        thingId: 5,
        sentence: 'manager released lot 24117.',
        before: { state: 'open' },
      }),
    );
  });
  afterAll(() => place.close());

  const whole = (db: Database = place.db) => db('audit_entries').select('*');

  it('keeps the program’s time, the database’s own, and from where the person acted', async () => {
    const [entry] = (await whole()) as { at: Date; recorded_at: Date; address: string; after: unknown }[];
    expect(entry.at).toEqual(at);
    expect(Math.abs(entry.recorded_at.getTime() - Date.now())).toBeLessThan(60_000);
    expect(entry).toMatchObject({ address: '192.0.2.7', before: { state: 'open' }, after: null });
  });

  it.each(Object.entries(CHANGES))('is safe from %s, by the database’s owner too', async (_name, sql) => {
    const before = await whole();
    await expect(place.db.raw(sql)).rejects.toThrow(REFUSED);
    expect(await whole()).toEqual(before);
  });

  it('is safe from a role that may only do what the program does, which cannot put the guard aside either', async () => {
    const name = `ebbline_${randomBytes(6).toString('hex')}`;
    await place.db.raw(`create role ${name} login password '${name}'`);
    await place.db.raw(`grant select, insert, update, delete, truncate on all tables in schema public to ${name}`);
    const url = new URL(place.url);
    url.username = name;
    url.password = name;
    const db = createDatabase(url.href, { min: 0, max: 1 });
    try {
      const before = await whole();
      for (const sql of Object.values(CHANGES)) await expect(db.raw(sql)).rejects.toThrow(REFUSED);
      await expect(db.raw('alter table audit_entries disable trigger all')).rejects.toThrow(/owner/);
      await expect(db.raw('drop trigger audit_entries_append_only on audit_entries')).rejects.toThrow(/owner/);
      await expect(db.raw('set session_replication_role = replica')).rejects.toThrow(/permission/);
      expect(await whole(db)).toEqual(before);
    } finally {
      await db.destroy();
      await place.db.raw(`drop owned by ${name}`);
      await place.db.raw(`drop role ${name}`);
    }
  });

  it('goes with the change that it records: no change, no entry', async () => {
    const before = await whole();
    const undone = place.db.transaction(async (tx) => {
      await insertAuditEntry(tx, {
        plantId: place.plant.id,
        at,
        actor: null,
        action: 'hold',
        thingKind: 'hold',
        thingId: 6,
        sentence: 'Ebbline held the lot.',
      });
      throw new Error('the change failed');
    });
    await expect(undone).rejects.toThrow('the change failed');
    expect(await whole()).toEqual(before);
  });
});
