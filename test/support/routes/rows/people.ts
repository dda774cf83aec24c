import { insertPerson, type TestPerson } from '../../factories/people';
import type { Asked, Entry, Row, Rows } from '../row';
import { ofPlant, settingUp } from '../row';
import type { World } from '../world';

const ofColleague = ({ plant, colleague }: World): Asked => ({ at: { id: plant.id, personId: colleague.id } });
const named: Entry['thing'] = (_, { asked }) => asked.at?.personId as number;

let newcomers = 0;

/** Somebody to whom it can be done, whatever was done to others before. */
async function newcomer({ app, plant }: World, state: object = {}): Promise<{ person: TestPerson; asked: Asked }> {
  const email = `newcomer${++newcomers}@marrowby.example`;
  const person = await insertPerson(app.database, {
    email,
    name: 'newcomer',
    plantId: plant.id,
    roles: ['technician'],
  });
  if (Object.keys(state).length > 0) await app.database('people').where({ id: person.id }).update(state);
  return { person, asked: { at: { id: plant.id, personId: person.id } } };
}

const done = (sentence: RegExp, prepare: (world: World) => Promise<Asked>): Pick<Row, 'write'> => ({
  write: { by: 'admin', prepare, entry: { sentence, kind: 'person', thing: named } },
});

export const PEOPLE_ROWS: Rows = {
  'GET /api/plants/{id}/people': { ...settingUp, ...ofPlant },
  'POST /api/plants/{id}/people': {
    ...settingUp,
    asked: ({ plant }) => ({
      at: { id: plant.id },
      body: { email: 'invited@marrowby.example', name: 'Ines Hartog', roles: ['technician'], lineIds: [] },
    }),
    write: {
      by: 'admin',
      entry: {
        sentence: /^admin invited Ines Hartog \(invited@marrowby\.example\) as metrology technician\.$/,
        kind: 'person',
        thing: (_, { answer }) => answer.id as number,
      },
    },
  },
  'POST /api/plants/{id}/people/{personId}/invitation': {
    ...settingUp,
    asked: ofColleague,
    ...done(/^admin invited again newcomer /, async (world) => (await newcomer(world, { password_hash: null })).asked),
  },
  'PATCH /api/plants/{id}/people/{personId}': {
    ...settingUp,
    asked: (world) => ({ ...ofColleague(world), body: { roles: ['engineer', 'technician'], lineIds: [] } }),
    ...done(/^admin .*newcomer/, async (world) => ({
      ...(await newcomer(world)).asked,
      body: { roles: ['engineer'], lineIds: [] },
    })),
  },
  'POST /api/plants/{id}/people/{personId}/disable': {
    ...settingUp,
    asked: ofColleague,
    ...done(/^admin disabled newcomer\.$/, async (world) => (await newcomer(world)).asked),
  },
  'POST /api/plants/{id}/people/{personId}/enable': {
    ...settingUp,
    asked: ofColleague,
    ...done(
      /^admin enabled newcomer\.$/,
      async (world) => (await newcomer(world, { disabled_at: world.app.clock.now() })).asked,
    ),
  },
};
