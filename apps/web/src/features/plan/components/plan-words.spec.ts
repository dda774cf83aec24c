import type { PlanState, PlanView } from '@app/contracts';
import { PARAMETER_ROWS, sortPlans, spanText } from './plan-words';

const plan = (revision: number, state: PlanState): PlanView => ({
  id: revision,
  channelId: 11,
  channelName: 'Coat weight',
  lineId: 1,
  lineName: 'Coater 2',
  plantId: 1,
  unit: 'g/m²',
  resolution: 0.01,
  revision,
  state,
  proposedBy: null,
  proposedAt: null,
  approvedBy: null,
  approvedAt: null,
  failure: null,
  reason: '',
  parameters: {
    method: 'smoothing_spline',
    isRobust: false,
    shortestPeriodSeconds: 3 * 86_400,
    effectivePeriodSeconds: 30 * 3_600,
    windowSeconds: 30 * 86_400,
    betweenLotsSd: 0.0712,
    betweenPointsSd: 0,
    betweenReadingsSd: 0.168,
    scale: 1.04,
    centre: -0.03,
    limit: 3,
    referenceLotCount: 98,
    allowanceNotice: 0.16,
    allowanceCap: null,
  },
  cautions: [],
  leftOutLots: [],
  mayApprove: false,
  whyNot: null,
});
const textOf = (name: string, of: PlanView) => PARAMETER_ROWS.find((item) => item.name === name)?.text(of);

describe('spanText', () => {
  it('uses days, and hours below two days', () => {
    expect(spanText(3 * 86_400)).toBe('3.0\u202fd');
    expect(spanText(30 * 3_600)).toBe('30.0\u202fh');
  });
});

describe('PARAMETER_ROWS', () => {
  it('shows numbers with unit, sign and resolution', () => {
    expect(textOf('SD between lots', plan(1, 'in_force'))).toBe('0.0712\u202fg/m²');
    expect(textOf('Centre of the scores', plan(1, 'in_force'))).toBe('\u22120.03');
    expect(textOf('Control limits', plan(1, 'in_force'))).toBe('±3.0\u202fσ');
    expect(textOf('Allowance, cap', plan(1, 'in_force'))).toBe('none stated');
  });
  it('shows a dash while a draft is being worked out', () => {
    expect(textOf('Window', { ...plan(1, 'draft'), parameters: null })).toBe('–');
  });
});

describe('sortPlans', () => {
  it('finds the one in force, the one that waits, and the rest newest first', () => {
    const { inForce, pending, others } = sortPlans([
      plan(1, 'retired'),
      plan(3, 'in_force'),
      plan(4, 'proposed'),
      plan(2, 'retired'),
    ]);
    expect(inForce?.revision).toBe(3);
    expect(pending?.revision).toBe(4);
    expect(others.map((item) => item.revision)).toEqual([2, 1]);
  });
  it('finds nothing in nothing', () => {
    expect(sortPlans([])).toEqual({ inForce: null, pending: null, others: [] });
  });
});
