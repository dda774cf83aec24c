import { insertIntake } from '../../factories/lots';
import { ofIntake, ofPlant, reading, type Rows, sending } from '../row';
import { insertApiToken, insertLayout, type World } from '../world';

const who = { who: 'upload and confirm an intake, withdraw one', permission: 'upload_intake' } as const;
const layoutAt = (world: World, layoutId: number) => ({ at: { id: world.plant.lines[0].id, layoutId } });
const tokenAt = (world: World, tokenId: number) => ({ at: { id: world.plant.id, tokenId } });

/** How workbooks are read, and by which machines they come. */
export const INTAKE_ROWS: Rows = {
  'POST /api/intakes/{id}/reading': {
    ...who,
    ...sending(ofIntake, { answers: {} }),
    write: {
      by: 'engineer',
      prepare: async ({ app, plant }) => ({
        at: { id: await insertIntake(app.database, plant, { state: 'needs_attention' }) },
        body: { answers: { date: '2026-03-09' } },
      }),
      entry: {
        sentence: /engineer said how coater-2-early\.xlsx for Coater 2 is to be read/,
        kind: 'intake',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'POST /api/intakes/{id}/withdraw': {
    ...who,
    asked: (world) => ({ at: { id: world.unconfirmedIntakeId }, body: { reason: 'The wrong shift.' } }),
    write: {
      by: 'engineer',
      prepare: async ({ app, plant }) => ({
        at: { id: await insertIntake(app.database, plant, { state: 'needs_attention' }) },
        body: { reason: 'The wrong shift.' },
      }),
      entry: {
        sentence: /engineer withdrew .*coater-2-early\.xlsx/,
        kind: 'intake',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'GET /api/intakes/{id}/settled': { ...reading, ...ofIntake },
  'POST /api/intakes/{id}/settled': {
    ...who,
    ...ofIntake,
    write: {
      exempt: 'Where no settled verdict would change, as here, nothing is done; its entry is tested where some do.',
    },
  },
  'DELETE /api/lines/{id}/layouts/{layoutId}': {
    ...who,
    asked: (world) => layoutAt(world, world.layoutId),
    write: {
      by: 'engineer',
      prepare: async (world) => layoutAt(world, await insertLayout(world.app, world.plant)),
      entry: {
        sentence: /engineer had the layout of the sheet "Readings" of Coater 2 forgotten/,
        kind: 'line',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'GET /api/plants/{id}/api-tokens': { ...who, ...ofPlant },
  'POST /api/plants/{id}/api-tokens': {
    ...who,
    ...sending(ofPlant, { name: 'Line computer' }),
    write: {
      by: 'engineer',
      entry: {
        sentence: /engineer made the API token "Line computer"/,
        kind: 'person',
        thing: (_, { by }) => by.id,
      },
    },
  },
  'DELETE /api/plants/{id}/api-tokens/{tokenId}': {
    ...who,
    ofNothing: 204,
    asked: (world) => tokenAt(world, world.apiTokenId),
    write: {
      by: 'engineer',
      prepare: async (world) => tokenAt(world, await insertApiToken(world.app, world.plant)),
      entry: { sentence: /engineer revoked the API token "Old script"/, kind: 'person', thing: (_, { by }) => by.id },
    },
  },
};
