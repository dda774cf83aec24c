import { PASSWORD } from '../../factories/people';
import type { Entry, Rows } from '../row';
import { ofOneself, reading } from '../row';
import type { World } from '../world';

const oneself = (sentence: RegExp): Entry => ({ sentence, kind: 'person', thing: (_, { by }) => by.id });
const atPlant = ({ plant }: World) => ({ at: { plantId: plant.id } });

/** What people change of their own. Last of all rows, and in this order: it ends the sessions of who asks. */
export const PROFILE_ROWS: Rows = {
  'GET /api/me/subscriptions/{plantId}': { ...reading, asked: atPlant },
  'PUT /api/me/subscriptions/{plantId}': {
    ...reading,
    asked: (world) => ({ ...atPlant(world), body: { subscriptions: [] } }),
    write: {
      by: 'manager',
      prepare: (world) => ({
        ...atPlant(world),
        body: { subscriptions: [{ kind: 'held_lots', isWanted: false }] },
      }),
      entry: oneself(/^manager does not want .* by mail\.$/),
    },
  },
  'PATCH /api/me': {
    ...ofOneself,
    asked: () => ({ body: { theme: 'dark' } }),
    write: { by: 'director', entry: oneself(/^director chose the theme "dark"\.$/) },
  },
  'POST /api/me/password': {
    ...ofOneself,
    asked: () => ({ body: { current: PASSWORD, next: 'slack water under the bridge' } }),
    write: { by: 'director', entry: oneself(/^director changed their password; every other session was ended\.$/) },
  },
  'POST /api/me/sign-out-everywhere': {
    ...ofOneself,
    write: { by: 'director', entry: oneself(/^director signed out everywhere\.$/) },
  },
};
