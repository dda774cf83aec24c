import { type ChangedLot, type Measure, NOTHING, type SummaryGauge } from '@app/contracts';
import {
  allowanceWords,
  changedFate,
  countBeside,
  cutSentence,
  decidedWords,
  fatesSentence,
  lastWeekWords,
  measureDetail,
} from './summary-words';
import { isAwaited, lastDay, madeId, underWayOf } from './week';

const THIN = '\u202f';

describe('what stands beside a figure of the week', () => {
  const measure: Measure = {
    lots: 3,
    quantities: [{ unit: 'm', amount: 12_400 }],
    lotsWithoutQuantity: 1,
    value: { amount: 9_000, currency: 'EUR', lotsWithout: 0 },
  };

  it('is its quantity, its value, and what states none', () => {
    expect(measureDetail(measure)).toBe(`12${THIN}400${THIN}m, 9${THIN}000${THIN}EUR, 1 lot without a quantity`);
    expect(measureDetail(NOTHING)).toBe('');
  });

  it('is last week’s, where the plant had one', () => {
    expect(lastWeekWords(0)).toBe('last week 0');
    expect([lastWeekWords(null), lastWeekWords(undefined)]).toEqual(['', '']);
    expect(countBeside(1, 9)).toBe('1 lot, 9 the week before');
    expect(countBeside(2, null)).toBe('2 lots');
  });

  it('is what was decided, by disposition', () => {
    const decided = [
      { ...NOTHING, lots: 3, disposition: 'release' as const },
      { ...NOTHING, disposition: 'rework' as const },
      { ...NOTHING, lots: 1, disposition: 'scrap' as const },
    ];
    expect(decidedWords(decided)).toBe('3 released, 1 scrapped');
    expect(decidedWords([])).toBe('none');
  });

  it('says when a list is cut', () => {
    expect([cutSentence(50, 61), cutSentence(3, 3)]).toEqual(['50 of 61 are listed.', null]);
  });
});

describe('a slow movement beside its bar', () => {
  const gauge = (differs: Partial<SummaryGauge>): SummaryGauge => ({
    channel: { id: 1, name: 'Coat weight' },
    line: { id: 1, name: 'Coater 2' },
    gaugeAssetNumber: 'BG-204',
    unit: 'g/m²',
    resolution: 0.01,
    movement: 0.2,
    cap: 0.35,
    share: 0.62,
    lastWeekShare: 0.41,
    isGettingWorse: true,
    ...differs,
  });

  it('is in words that need no bar', () => {
    expect(allowanceWords(gauge({}))).toBe(`62${THIN}% of its allowance, 41${THIN}% the week before: getting worse`);
    expect(allowanceWords(gauge({ lastWeekShare: null, isGettingWorse: false }))).toBe(`62${THIN}% of its allowance`);
    expect(allowanceWords(gauge({ share: 1.1 }))).toContain(
      'beyond it, lots are not scored until the gauge is checked',
    );
    expect(allowanceWords(gauge({ share: null, cap: null }))).toBe('its plan states no allowance');
  });
});

describe('lots on which limits differ', () => {
  const lot = (hold: ChangedLot['hold']) => ({ hold }) as ChangedLot;

  it('have their fate in words, alone and together', () => {
    expect(changedFate(lot(null))).toBe('moved on, never held');
    expect(changedFate(lot({ id: 1, state: 'open', dispositions: [] }))).toBe('held, undecided');
    expect(changedFate(lot({ id: 1, state: 'decided', dispositions: ['release', 'scrap', 'scrap'] }))).toBe(
      'released and scrapped',
    );
    const fates = [
      { fate: 'moved_on' as const, lots: 3 },
      { fate: 'scrap' as const, lots: 1 },
      { fate: 'held' as const, lots: 0 },
    ];
    expect(fatesSentence({ count: 4, lots: [], fates, lastWeekCount: null })).toBe('Of these: 3 moved on, 1 scrapped.');
  });
});

describe('a week', () => {
  it('ends on its Sunday, also over a year’s end and a clock change', () => {
    expect(['2026-12-28', '2026-03-23', '2026-02-23'].map(lastDay)).toEqual(['2027-01-03', '2026-03-29', '2026-03-01']);
  });

  it('is made once the list has the version asked for, or a later one', () => {
    const item = { id: 1, weekStartsOn: '2026-03-02', version: 2, madeAt: '2026-03-09T06:00:00Z', headline: 'x' };
    const asked = { weekStartsOn: '2026-03-02', version: 2, jobId: 7 };
    expect(madeId([item], asked)).toBe(1);
    expect(madeId([item], { ...asked, version: 3 })).toBeUndefined();
    expect(madeId([item], { ...asked, weekStartsOn: '2026-03-09' })).toBeUndefined();
    expect(madeId(undefined, asked)).toBeUndefined();
  });

  it('is awaited no longer once it is made or given up, and an earlier failure does not count', () => {
    const asked = { weekStartsOn: '2026-03-02', version: 2, jobId: 7 };
    const underWay = (jobId: number, state: 'being_made' | 'failed') => ({
      jobId,
      weekStartsOn: '2026-03-02',
      state,
      since: '2026-03-09T06:00:00Z',
      sentence: state === 'failed' ? 'Ebbline gave up.' : null,
    });
    const list = (item: ReturnType<typeof underWay>) => ({
      items: [],
      lastWeekStartsOn: '2026-03-02',
      underWay: [item],
      maySend: true,
    });
    expect(isAwaited(undefined, asked)).toBe(true);
    expect(isAwaited(list(underWay(7, 'being_made')), asked)).toBe(true);
    expect(isAwaited(list(underWay(6, 'failed')), asked)).toBe(true);
    expect(isAwaited(list(underWay(7, 'failed')), asked)).toBe(false);
    expect(isAwaited(list(underWay(7, 'being_made')), null)).toBe(false);
    expect(underWayOf(list(underWay(7, 'failed')), '2026-03-02')?.jobId).toBe(7);
    expect(underWayOf(list(underWay(7, 'failed')), '2026-03-09')).toBeUndefined();
  });
});
