import {
  listLineRecipients,
  listReminderRecipients,
  listSubscriptions,
  listSummaryRecipients,
  type MailRecipient,
  upsertSubscriptions,
} from './subscriptions';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

describe('who gets which mail', () => {
  let place: PlantDatabase;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(() => place.reset());

  const names = (found: MailRecipient[]) => found.map(({ email }) => email.split('@')[0]);
  const say = (
    who: keyof typeof place.plant.people,
    kind: 'held_lots' | 'weekly_summary' | 'hold_reminders',
    isWanted: boolean,
  ) =>
    place.db.transaction((tx) =>
      upsertSubscriptions(tx, place.plant.id, place.plant.people[who].id, [{ kind, isWanted }]),
    );
  const held = async (line = 0) => names(await listLineRecipients(place.db, place.plant.lines[line].id, 'held_lots'));
  const summary = async () => names(await listSummaryRecipients(place.db, place.plant.id));

  it('about a line: its engineers and leads and the quality managers, not who may not sign in (yet or any more)', async () => {
    expect(await held()).toEqual(['engineer2', 'engineer', 'lead', 'manager']);
    expect(await held(1)).toEqual(['manager']);
    await place.db('people').where({ id: place.plant.people.engineer.id }).update({ disabled_at: new Date() });
    await place.db('people').where({ id: place.plant.people.lead.id }).update({ password_hash: null });
    expect(await held()).toEqual(['engineer2', 'manager']);
  });

  it('about a line: not who does not want it, and who wants it on a line of theirs', async () => {
    await say('engineer', 'held_lots', false);
    await say('manager', 'held_lots', false);
    await say('technician', 'held_lots', true);
    expect(await held()).toEqual(['engineer2', 'lead', 'technician']);
    expect(await held(1)).toEqual([]);
    expect(names(await listLineRecipients(place.db, place.plant.lines[0].id, 'decisions'))).toEqual([
      'engineer2',
      'engineer',
      'lead',
      'manager',
    ]);
    await place.db('line_assignments').where({ person_id: place.plant.people.technician.id }).delete();
    expect(await held(1)).toEqual(['technician']);
  });

  it('the weekly summary: directors, and others who may read it and want it', async () => {
    expect(await summary()).toEqual(['director']);
    await say('director', 'weekly_summary', false);
    await say('engineer', 'weekly_summary', true);
    await say('lead', 'weekly_summary', true);
    expect(await summary()).toEqual(['engineer']);
    await say('director', 'weekly_summary', true);
    expect(await summary()).toEqual(['director', 'engineer']);
  });

  it('reminders: the role that they are for, unless somebody does not want them', async () => {
    const reminded = async () => [
      names(await listReminderRecipients(place.db, place.plant.id, 'quality_manager')),
      names(await listReminderRecipients(place.db, place.plant.id, 'director')),
    ];
    expect(await reminded()).toEqual([['manager'], ['director']]);
    await say('director', 'hold_reminders', false);
    expect(await reminded()).toEqual([['manager'], []]);
  });

  it('is told to each person for the kinds that their roles may have', async () => {
    const { director, lead } = place.plant.people;
    await say('director', 'weekly_summary', false);
    expect(await listSubscriptions(place.db, place.plant.id, director.id, ['director'])).toEqual([
      { kind: 'weekly_summary', isWanted: false, isChosen: true },
      { kind: 'held_lots', isWanted: false, isChosen: false },
      { kind: 'decisions', isWanted: false, isChosen: false },
      { kind: 'hold_reminders', isWanted: true, isChosen: false },
    ]);
    expect(await listSubscriptions(place.db, place.plant.id, lead.id, ['line_lead'])).toEqual([
      { kind: 'held_lots', isWanted: true, isChosen: false },
      { kind: 'decisions', isWanted: true, isChosen: false },
    ]);
  });
});
