import { PASSWORD } from '../../factories/people';
import type { TestApp } from '../../app';
import { issueSecret } from '../world';
import { ofOneself, open, type Rows } from '../row';

async function refreshCookie(app: TestApp, email: string): Promise<string> {
  const answer = await app.http.post('/api/auth/sign-in').send({ email, password: PASSWORD }).expect(200);
  return answer.get('Set-Cookie')?.[0].split(';')[0] ?? '';
}

export const SIGN_IN_ROWS: Rows = {
  'GET /api/health/live': open,
  'GET /api/health/ready': open,
  'POST /api/auth/sign-in': {
    ...open,
    asked: ({ plant }) => ({ body: { email: plant.people.lead.email, password: PASSWORD } }),
    write: {
      by: 'lead',
      entry: { sentence: /lead signed in/, kind: 'person', thing: (_, { by }) => by.id, isOfNobody: true },
    },
  },
  'POST /api/auth/refresh': {
    ...open,
    write: {
      exempt: 'prolongs a session whose beginning is an entry; an entry each quarter of an hour would bury the others',
    },
  },
  'POST /api/auth/sign-out': {
    ...open,
    write: {
      by: 'technician',
      prepare: async ({ app, plant }) => ({ cookie: await refreshCookie(app, plant.people.technician.email) }),
      entry: { sentence: /^technician signed out/, kind: 'person', thing: (_, { by }) => by.id, isOfNobody: true },
    },
  },
  'POST /api/auth/password-reset': {
    ...open,
    asked: ({ colleague }) => ({ body: { email: colleague.email } }),
    write: {
      by: 'lead',
      entry: {
        sentence: /^A link to choose a new password was asked for and mailed to colleague\./,
        kind: 'person',
        thing: (world) => world.colleague.id,
        isOfNobody: true,
      },
    },
  },
  'GET /api/auth/links/{token}': { ...open, asked: ({ linkSecret }) => ({ at: { token: linkSecret } }) },
  'POST /api/auth/links/{token}': {
    ...open,
    asked: ({ linkSecret }) => ({ at: { token: linkSecret }, body: { password: 'low water in the estuary' } }),
    write: {
      by: 'lead',
      prepare: async ({ app, colleague }) => ({
        at: { token: await issueSecret(app, colleague.id) },
        body: { password: 'low water in the estuary' },
      }),
      entry: {
        sentence: /^colleague chose a new password by the link that was mailed\./,
        kind: 'person',
        thing: (world) => world.colleague.id,
        isOfNobody: true,
      },
    },
  },
  'GET /api/me': ofOneself,
};
