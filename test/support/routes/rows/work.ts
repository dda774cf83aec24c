import { insertIntake } from '../../factories/lots';
import { PASSWORD } from '../../factories/people';
import { ofChannel, ofHold, ofIntake, ofLine, ofPlan, type Rows, sending } from '../row';
import { openHold } from '../world';

const file = { name: 'coater-2-late.xlsx', bytes: Buffer.from('no workbook') };
const decision = {
  disposition: 'release',
  reason: 'Retained samples are fine.',
  password: PASSWORD,
  evidenceVersion: 1,
};
const wiped = { at: '2026-03-10T06:00:00Z', kind: 'adjustment', reason: 'Window wiped.' };

/** Intakes, holds, plans and breaks: what a shift changes. */
export const WORK_ROWS: Rows = {
  'POST /api/lines/{id}/intakes': {
    who: 'upload and confirm an intake, withdraw one',
    permission: 'upload_intake',
    asked: (world) => ({ ...ofLine.asked?.(world), file }),
    write: {
      by: 'engineer',
      entry: {
        sentence: /engineer uploaded coater-2-late\.xlsx for Coater 2/,
        kind: 'intake',
        thing: (_, { answer }) => answer.id as number,
      },
    },
  },
  'POST /api/intakes/{id}/confirm': {
    who: 'upload and confirm an intake, withdraw one',
    permission: 'upload_intake',
    ...ofIntake,
    write: {
      by: 'manager',
      prepare: async ({ app, plant }) => {
        const id = await insertIntake(app.database, plant, { state: 'needs_attention' });
        const report = { isBlocked: false, readingsParsed: 2 };
        await app
          .database('intakes')
          .where({ id })
          .update({ report: JSON.stringify(report) });
        return { at: { id } };
      },
      entry: {
        sentence: /manager confirmed the intake of coater-2-early\.xlsx/,
        kind: 'intake',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'POST /api/holds/{id}/set-aside': {
    who: 'confirm that a lot is set aside',
    permission: 'set_aside',
    ...sending(ofHold, { place: 'bay 7' }),
    write: {
      by: 'lead',
      entry: {
        sentence: /lead confirmed that lot \d+ is set aside: bay 7/,
        kind: 'hold',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'POST /api/holds/{id}/decision': {
    who: 'release a lot held for control limits alone',
    permission: 'release_for_control_limits',
    ...sending(ofHold, decision),
    write: {
      by: 'manager',
      prepare: async ({ app, shift }) => ({ at: { id: await openHold(app, shift) }, body: decision }),
      entry: {
        sentence: /manager released lot \d+: Retained samples are fine\./,
        kind: 'hold',
        thing: (_, { asked }) => asked.at?.id as number,
      },
    },
  },
  'POST /api/channels/{id}/plans': {
    who: 'draft and propose a plan, exclude a lot, declare a break',
    permission: 'propose_plan',
    ...sending(ofChannel, { reason: 'More readings.' }),
    write: {
      by: 'engineer',
      prepare: ({ plant }) => ({ at: { id: plant.channels[1].id }, body: { reason: 'First plan.' } }),
      entry: {
        sentence: /engineer asked for a default plan for Web thickness on Coater 2: First plan\./,
        kind: 'plan',
        thing: (_, { answer }) => answer.id as number,
      },
    },
  },
  'POST /api/plans/{id}/approval': {
    who: 'any other decision, close a look-back, approve a plan',
    permission: 'approve_plan',
    ...sending(ofPlan, { password: PASSWORD }),
    write: {
      by: 'manager',
      entry: {
        sentence: /manager approved revision 2 of the plan for Coat weight on Coater 2/,
        kind: 'plan',
        thing: (world) => world.proposedPlanId,
      },
    },
  },
  'POST /api/channels/{id}/breaks': {
    who: 'draft and propose a plan, exclude a lot, declare a break',
    permission: 'declare_break',
    ...sending(ofChannel, wiped),
    write: {
      by: 'engineer',
      entry: {
        sentence: /engineer declared an adjustment on Coat weight of Coater 2: Window wiped\./,
        kind: 'channel',
        thing: (world) => world.plant.channels[0].id,
      },
    },
  },
};
