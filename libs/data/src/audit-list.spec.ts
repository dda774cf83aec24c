import { insertRow } from '../../../test/support/factories/insert';
import { insertIntake, insertLot } from '../../../test/support/factories/lots';
import { insertPerson } from '../../../test/support/factories/people';
import { insertPlan } from '../../../test/support/factories/plans';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { type AuditEntry, insertAuditEntry } from './audit';
import { type AuditFilter, getAuditCount, listAuditEntries, listAuditKinds, listAuditPeople } from './audit-list';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

describe('the audit trail', () => {
  let place: PlantDatabase;
  let plant: TestPlant;
  let other: TestPlant;
  const at = (minute: number) => new Date(Date.UTC(2026, 2, 11, 8, minute));

  beforeAll(async () => {
    place = await openPlantDatabase();
    plant = place.plant;
    other = await insertPlant(place.db, { name: 'Overdale', domain: 'overdale.example' });
    const { engineer, manager } = plant.people;
    await write({ at: at(1), actor: engineer, action: 'upload', thingKind: 'intake', thingId: 7 });
    await write({
      at: at(2),
      actor: null,
      action: 'hold',
      thingKind: 'hold',
      thingId: 5,
      sentence: 'Ebbline held 50_50.',
    });
    await write({ at: at(3), actor: manager, action: 'release', thingKind: 'hold', thingId: 5 });
    await write({ at: at(3), actor: manager, action: 'scrap', thingKind: 'hold', thingId: 6 });
    await write({ plantId: other.id, at: at(4), actor: other.people.manager, action: 'scrap', thingKind: 'hold' });
    const signIn = { plantId: null, action: 'sign-in', thingKind: 'person' };
    const stranger = other.people.engineer;
    await write({ ...signIn, at: at(5), actor: engineer, thingId: engineer.id });
    await write({ ...signIn, at: at(6), actor: stranger, thingId: stranger.id });
    const nobody = await insertPerson(place.db, { email: 'nobody@marrowby.example' });
    await write({ ...signIn, at: at(7), actor: nobody, thingId: nobody.id });
    await write({ plantId: null, at: at(8), actor: null, action: 'reset', thingKind: 'person', thingId: manager.id });
  });
  afterAll(() => place.close());

  const write = (entry: Partial<AuditEntry>) =>
    place.db.transaction((tx) =>
      insertAuditEntry(tx, {
        plantId: plant.id,
        at: at(0),
        actor: null,
        action: 'hold',
        thingKind: 'hold',
        thingId: 1,
        sentence: 'Something was done.',
        ...entry,
      }),
    );
  const filter = (wanted: Partial<AuditFilter> = {}): AuditFilter => ({
    plantId: plant.id,
    withPlantless: false,
    ...wanted,
  });
  async function found(wanted: Partial<AuditFilter> = {}): Promise<string[]> {
    const all = await listAuditEntries(place.db, filter(wanted), { limit: 100, offset: 0 });
    expect(await getAuditCount(place.db, filter(wanted))).toBe(all.length);
    return all.map((entry) => entry.action);
  }

  it('is read newest first, the later written first at the same instant', async () => {
    expect(await found()).toEqual(['scrap', 'release', 'hold', 'upload']);
  });

  it('is found by person, by what Ebbline did, by kind, thing, action, time and words', async () => {
    expect(await found({ actorId: plant.people.manager.id })).toEqual(['scrap', 'release']);
    expect(await found({ actorId: null })).toEqual(['hold']);
    expect(await found({ thingKind: 'intake' })).toEqual(['upload']);
    expect(await found({ thingKind: 'hold', thingId: 5 })).toEqual(['release', 'hold']);
    expect(await found({ action: 'scrap' })).toEqual(['scrap']);
    expect(await found({ from: at(2), to: at(3) })).toEqual(['hold']);
    expect(await found({ text: ' 50_50 ' })).toEqual(['hold']);
    expect(await found({ text: '5%5' })).toEqual([]);
  });

  it('keeps entries of no plant for who may see them, of the plant’s own people alone', async () => {
    expect(await found({ withPlantless: true })).toEqual(['reset', 'sign-in', 'scrap', 'release', 'hold', 'upload']);
    expect(await found({ withPlantless: true, thingKind: 'person' })).toEqual(['reset', 'sign-in']);
    expect(await found({ thingKind: 'person' })).toEqual([]);
  });

  it('is read page by page, or on from an entry, without gaps', async () => {
    const all = await listAuditEntries(place.db, filter({ withPlantless: true }), { limit: 100, offset: 0 });
    const ids = all.map((entry) => entry.id);
    const page = await listAuditEntries(place.db, filter({ withPlantless: true }), { limit: 2, offset: 2 });
    expect(page.map((entry) => entry.id)).toEqual(ids.slice(2, 4));
    const read: number[] = [];
    for (let olderThanId: number | undefined; ; olderThanId = read.at(-1)) {
      const next = await listAuditEntries(place.db, filter({ withPlantless: true }), { limit: 2, olderThanId });
      if (next.length === 0) break;
      read.push(...next.map((entry) => entry.id));
    }
    expect(read).toEqual(ids);
  });

  it('tells who acted and what was done to which kinds of thing', async () => {
    const plain = { plantId: plant.id, withPlantless: false };
    expect((await listAuditPeople(place.db, plain)).map((person) => person.name)).toEqual(['engineer', 'manager']);
    expect(await listAuditKinds(place.db, plain)).toEqual([
      { kind: 'hold', actions: ['hold', 'release', 'scrap'] },
      { kind: 'intake', actions: ['upload'] },
    ]);
    const kinds = await listAuditKinds(place.db, { ...plain, withPlantless: true });
    expect(kinds.at(-1)).toEqual({ kind: 'person', actions: ['reset', 'sign-in'] });
    expect(await listAuditPeople(place.db, { ...plain, withPlantless: true })).toHaveLength(7);
  });

  it('names each thing as it is called now, and leaves what is gone or unknown without a name', async () => {
    const { id, lines, channels, productId, people } = plant;
    const [channel] = channels;
    const weekId = await insertRow(place.db, 'summaries', {
      plant_id: id,
      week_starts_on: '2026-03-02',
      version: 1,
      content: '{}',
      made_at: at(0),
    });
    const planId = await insertPlan(place.db, plant, channel);
    const intakeId = await insertIntake(place.db, plant);
    const lot = await insertLot(place.db, plant, { number: '24117', startsAt: at(0) });
    const names: [kind: string, id: number, name: string | null][] = [
      ['plant', id, 'Marrowby Works'],
      ['line', lines[0].id, 'Coater 2'],
      ['channel', channel.id, 'Coat weight'],
      ['gauge', channel.gaugeId, 'BG-204'],
      ['product', productId, 'SEP-16'],
      ['characteristic', channel.characteristicId, 'Coat weight'],
      ['person', people.lead.id, 'lead'],
      ['summary', weekId, 'week of 2 Mar 2026'],
      ['plan', planId, 'Coat weight, revision 1'],
      ['intake', intakeId, 'coater-2-early.xlsx'],
      ['lot', lot.id, 'lot 24117'],
      ['hold', 999_999, null],
      ['something', 1, null],
    ];
    for (const [thingKind, thingId] of names) await write({ action: 'named', thingKind, thingId });
    const found = await listAuditEntries(place.db, filter({ action: 'named' }), { limit: 100, offset: 0 });
    expect(found.reverse().map((entry) => [entry.thingKind, entry.thingId, entry.thingName])).toEqual(names);
  });
});
