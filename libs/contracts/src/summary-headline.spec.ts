import type { SummaryContent } from './api/summaries';
import { summaryHeadline } from './summary-headline';
import { figures, gauge, lotsOf500, madeSummary, openHold } from './testing/made-summary';

const holds = (...open: ReturnType<typeof openHold>[]): Partial<SummaryContent> => ({
  openHolds: { count: open.length, holds: open },
  total: { week: figures({ stillOpen: lotsOf500(open.length), held: lotsOf500(open.length) }), lastWeek: null },
});
const notScored: Partial<SummaryContent> = {
  total: { week: figures({ notFullyScored: 3 }), lastWeek: null },
  notScored: [
    {
      line: { id: 1, name: 'Coater 2' },
      channel: { id: 11, name: 'Coat weight' },
      reason: 'learning',
      sentence: 'the baseline is still learning',
      lots: 3,
      lastWeekLots: 0,
    },
  ],
};
const beyond = { gauges: [gauge({ share: 1.12 }), gauge()] };
const plain = (facts: Partial<SummaryContent>) => summaryHeadline(madeSummary(facts)).replaceAll('\u202f', ' ');

describe('the first sentence of a week', () => {
  it('names the oldest lot that waits longer than the director allows, before anything else', () => {
    expect(plain({ ...notScored, ...beyond, ...holds(openHold()) })).toBe(
      'Lot 24118 of Coater 2 had been on hold for 2 d 4 h at the week’s end and is still undecided: 500 m (900 EUR) at risk.',
    );
    expect(plain(holds(openHold(), openHold({ ageHours: 3 }), openHold({ ageHours: 1 })))).toBe(
      'Lot 24118 of Coater 2 had been on hold for 2 d 4 h at the week’s end and is still undecided; 2 more lots wait: 1 500 m (2 700 EUR) at risk in all.',
    );
  });

  it('tells what is at risk when no lot has waited that long', () => {
    expect(plain({ ...notScored, ...beyond, ...holds(openHold({ ageHours: 23.9 }), openHold({ ageHours: 3 })) })).toBe(
      '2 lots (1 000 m, 1 800 EUR) on hold wait to be decided; the oldest had waited 23 h at the week’s end.',
    );
  });

  it('counts the director’s hours themselves as beyond', () => {
    expect(plain(holds(openHold({ ageHours: 24 })))).toContain('on hold for 1 d at');
    const later = { ...holds(openHold({ ageHours: 24 })), reminderHours: { manager: 8, director: 25 } };
    expect(plain(later)).toBe(
      '1 lot (500 m, 900 EUR) on hold waits to be decided; the oldest had waited 1 d at the week’s end.',
    );
  });

  it('leaves out what was decided since the week ended', () => {
    const decided = openHold({ decidedSince: 'release' });
    expect(plain(holds(decided, openHold({ lot: { id: 71, number: '24130' }, ageHours: 4 })))).toBe(
      '1 lot (500 m, 900 EUR) on hold waits to be decided; the oldest had waited 4 h at the week’s end.',
    );
    expect(plain(holds(decided))).toBe('The one held lot is decided, and all 84 lots measured were scored.');
  });

  it('tells of a slow movement beyond its allowance when nothing waits', () => {
    expect(plain({ ...notScored, ...beyond })).toBe(
      'The slow movement of Coat weight on Coater 2 has gone beyond its allowance (112 % of it): lots there are not scored until the gauge is checked.',
    );
    expect(plain({ gauges: [gauge({ share: 1 })] })).toContain('No lot was held');
  });

  it('tells of a slow movement that will soon be there at its pace', () => {
    const fast = gauge({ share: 0.41, lastWeekShare: 0.02, isGettingWorse: true });
    expect(
      plain({ ...notScored, gauges: [gauge({ share: 0.45, lastWeekShare: 0.35, isGettingWorse: true }), fast] }),
    ).toBe(
      'No held lot waits, but the slow movement of Coat weight on Coater 2 has used 41 % of its allowance, 2 % the week before; at that pace it is used up within 2 weeks.',
    );
  });

  it('tells of lots without a score when no movement is the reason', () => {
    expect(plain(notScored)).toBe(
      'No held lot waits, but 3 of 84 lots went without a score on a channel, most on Coat weight of Coater 2: the baseline is still learning.',
    );
  });

  it('says that nothing waits otherwise', () => {
    expect(plain({})).toBe('No lot was held, and all 84 lots measured were scored.');
    expect(plain({ total: { week: figures({ held: lotsOf500(4) }), lastWeek: null } })).toBe(
      'All held lots are decided, and all 84 lots measured were scored.',
    );
    expect(plain({ total: { week: figures({ measured: lotsOf500(0) }), lastWeek: null } })).toBe(
      'No lot was measured in this week, and none waits on hold.',
    );
  });
});
