import { ofPlant, type Rows, settingUp } from '../row';

export const MAIL_ROWS: Rows = {
  'GET /api/plants/{id}/mails': { ...settingUp, ...ofPlant },
  'GET /api/mails/{id}': { ...settingUp, asked: ({ mailId }) => ({ at: { id: mailId } }) },
  'POST /api/mails/{id}/send-again': {
    ...settingUp,
    asked: ({ mailId }) => ({ at: { id: mailId } }),
    write: {
      by: 'admin',
      entry: {
        sentence: /^admin had the mail “Lot 24118 is held” to lead@marrowby\.example sent again/,
        kind: 'mail',
        thing: (world) => world.mailId,
      },
    },
  },
};
