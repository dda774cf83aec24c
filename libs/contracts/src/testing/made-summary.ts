import {
  type Measure,
  NOTHING,
  type SummaryContent,
  type SummaryGauge,
  type SummaryOpenHold,
  type WeekFigures,
} from '../api/summaries';

/** So many lots of 500 m, each worth 900 EUR. */
export const lotsOf500 = (lots: number): Measure => ({
  lots,
  quantities: lots === 0 ? [] : [{ unit: 'm', amount: 500 * lots }],
  lotsWithoutQuantity: 0,
  value: lots === 0 ? null : { amount: 900 * lots, currency: 'EUR', lotsWithout: 0 },
});

export const figures = (differs: Partial<WeekFigures> = {}): WeekFigures => ({
  measured: lotsOf500(84),
  scored: lotsOf500(84),
  notFullyScored: 0,
  held: NOTHING,
  decided: [],
  stillOpen: NOTHING,
  stillOpenByAge: [],
  ...differs,
});

export const openHold = (differs: Partial<SummaryOpenHold> = {}): SummaryOpenHold => ({
  holdId: 7,
  lot: { id: 70, number: '24118' },
  line: { id: 1, name: 'Coater 2' },
  product: 'SEP-16',
  quantity: 500,
  quantityUnit: 'm',
  value: 900,
  openedAt: '2026-03-06T20:00:00.000Z',
  ageHours: 52,
  sentence: 'Lot 24118 lies 4.3 σ below its baseline in coat weight (control limit 3.0 σ).',
  isSetAside: true,
  decidedSince: null,
  ...differs,
});

export const gauge = (differs: Partial<SummaryGauge> = {}): SummaryGauge => ({
  channel: { id: 11, name: 'Coat weight' },
  line: { id: 1, name: 'Coater 2' },
  gaugeAssetNumber: 'BG-204',
  unit: 'g/m²',
  resolution: 0.01,
  movement: 0.246,
  cap: 0.6,
  share: 0.41,
  lastWeekShare: 0.38,
  isGettingWorse: false,
  ...differs,
});

/** A quiet week of one line; what differs is told. */
export function madeSummary(differs: Partial<SummaryContent> = {}): SummaryContent {
  const week = figures();
  return {
    plant: { id: 1, name: 'Marrowby Works', timeZone: 'Europe/London', currency: 'EUR' },
    week: { startsOn: '2026-03-02', from: '2026-03-02T00:00:00.000Z', to: '2026-03-09T00:00:00.000Z' },
    reminderHours: { manager: 8, director: 24 },
    headline: '',
    whatToAsk: [],
    total: { week, lastWeek: figures() },
    lines: [{ line: { id: 1, name: 'Coater 2' }, week, lastWeek: figures() }],
    openHolds: { count: 0, holds: [] },
    changedByBaseline: {
      onlyUnadjusted: { count: 0, lots: [], fates: [], lastWeekCount: 0 },
      onlyPlan: { count: 0, lots: [], fates: [], lastWeekCount: 0 },
    },
    gauges: [gauge()],
    notScored: [],
    intakes: { count: 0, intakes: [] },
    ...differs,
  };
}
