import { insertLot, insertReadings } from '../../factories/lots';
import { ofPlant, type Rows, sending } from '../row';
import type { World } from '../world';

const reading = { who: 'read summaries', permission: 'read_summary' } as const;
const ofSummary = { asked: ({ summaryId }: World) => ({ at: { id: summaryId } }) };
const week = { weekStartsOn: '2026-03-02' };

export const SUMMARY_ROWS: Rows = {
  'GET /api/plants/{id}/summaries': { ...reading, ...ofPlant },
  'GET /api/summaries/{id}': { ...reading, ...ofSummary },
  'GET /api/summaries/{id}/workbook': { ...reading, ...ofSummary },
  'POST /api/plants/{id}/summaries': {
    who: 'send summaries',
    permission: 'send_summary',
    ...sending(ofPlant, week),
    write: {
      by: 'manager',
      prepare: async (world) => {
        const { app, plant, shift } = world;
        const lot = await insertLot(app.database, plant, { number: '24001', startsAt: '2026-03-04T06:00:00Z' });
        const place = { channel: plant.channels[0], lot, intakeId: shift.intakeId };
        await insertReadings(app.database, plant, place, [60, 60.1]);
        return { ...ofPlant.asked?.(world), body: week };
      },
      entry: {
        sentence: /^manager asked for a new version of the summary of the week of .*2026\.$/,
        kind: 'plant',
        thing: (world) => world.plant.id,
      },
    },
  },
};
