import { insertRow } from '../../factories/insert';
import { PASSWORD } from '../../factories/people';
import { ofPlant, ofProposal, reading, type Rows, sending, settingUp } from '../row';
import { insertProposal } from '../world';

const shifts = {
  validFrom: '2026-04-01',
  shifts: [
    { name: 'day', startsAt: '06:00', endsAt: '18:00' },
    { name: 'night', startsAt: '18:00', endsAt: '06:00' },
  ],
};

/** The plant itself, its shifts and its specifications. */
export const SET_UP_PLANT_ROWS: Rows = {
  'POST /api/plants': {
    who: 'administrators of whichever plant',
    permission: 'set_up_plant',
    asked: () => ({ body: { name: 'Fennick Works', timeZone: 'Europe/Berlin' } }),
    write: {
      by: 'admin',
      entry: {
        sentence: /^admin added the plant Fennick Works and is its administrator\.$/,
        kind: 'plant',
        thing: (_, { answer }) => answer.id as number,
        plant: ({ answer }) => answer.id as number,
      },
    },
  },
  'GET /api/plants/{id}/set-up': { ...reading, ...ofPlant },
  'PATCH /api/plants/{id}/set-up': {
    ...settingUp,
    ...sending(ofPlant, { reminderManagerHours: 6 }),
    write: {
      by: 'admin',
      entry: {
        sentence: /^admin changed the plant Marrowby Works: .* from 8 to 6\.$/,
        kind: 'plant',
        thing: (world) => world.plant.id,
      },
    },
  },
  'GET /api/plants/{id}/set-up/shifts': { ...reading, ...ofPlant },
  'PUT /api/plants/{id}/set-up/shifts': {
    ...settingUp,
    ...sending(ofPlant, shifts),
    write: {
      by: 'admin',
      entry: {
        sentence:
          /^admin set the shifts of Marrowby Works from 2026-04-01 on: day 06:00 to 18:00, night 18:00 to 06:00\.$/,
        kind: 'plant',
        thing: (world) => world.plant.id,
      },
    },
  },
  'GET /api/plants/{id}/set-up/specifications': { ...reading, ...ofPlant },
  'POST /api/plants/{id}/set-up/specification-proposals': {
    who: 'propose a specification',
    permission: 'propose_specification',
    ...sending(ofPlant, ({ plant }) => ({
      productId: plant.productId,
      characteristicId: plant.channels[1].characteristicId,
      nominal: 25,
      lower: 24.5,
      upper: 25.5,
      appliesToIndividuals: false,
      validFrom: '2026-03-12T06:00:00Z',
      reason: 'The customer asks for less spread.',
    })),
    write: {
      by: 'engineer',
      entry: {
        sentence: /^engineer proposed Web thickness of SEP-16 as .*: The customer asks for less spread\.$/,
        kind: 'specification_proposal',
      },
    },
  },
  'POST /api/specification-proposals/{id}/approval': {
    who: 'any other decision, close a look-back, approve a plan',
    permission: 'approve_specification',
    ...sending(ofProposal, { password: PASSWORD }),
    write: {
      by: 'manager',
      entry: {
        sentence: /^manager approved version 2 of Coat weight of SEP-16: .*, proposed by engineer\.$/,
        kind: 'specification_proposal',
        thing: (world) => world.proposalId,
      },
    },
  },
  // Whoever proposed it, here the engineer, or a quality manager.
  'POST /api/specification-proposals/{id}/withdrawal': {
    who: 'draft and propose a plan, exclude a lot, declare a break',
    permission: 'propose_specification',
    ...ofProposal,
    write: {
      by: 'engineer',
      prepare: async ({ app, plant }) => {
        const productId = await insertRow(app.database, 'products', {
          plant_id: plant.id,
          code: 'SEP-12',
          name: 'Separator 12',
        });
        return { at: { id: await insertProposal(app, plant, productId) } };
      },
      entry: {
        sentence: /^engineer withdrew the proposed specification of Coat weight of SEP-12\.$/,
        kind: 'specification_proposal',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
};
