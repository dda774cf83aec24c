import { judgeSegment } from './judge-segment';
import { DAY, madePlan, onePointLot, SPACING } from './testing/made-lots';
import { normals } from './testing/seeded-random';
import type { LotOnChannel } from './types';

/** 220 lots on a slow wave; lot 100 is 8 out. T_eff = 36 lot spacings, so that verdicts look 18 lots past. */
function channel(seed: number): LotOnChannel[] {
  const normal = normals(seed);
  return Array.from({ length: 220 }, (_, j) => onePointLot(j, 2.5 * Math.sin(j / 20) + normal() + (j === 100 ? 8 : 0)));
}

const PLAN = madePlan();
/** Lots that start within T_eff / 2 of a lot's end, after it. */
const REACH = 18;

function judge(lots: LotOnChannel[], ids: number[], segmentEndsAt: number | null = null) {
  return judgeSegment({ plan: PLAN, lots, lotIdsToJudge: ids, segmentStartsAt: 0, segmentEndsAt }).lots;
}

describe('settled verdict', () => {
  it.each([11, 12, 13])('is the same to the bit whatever is uploaded later (seed %d)', (seed) => {
    const lots = channel(seed);
    const ids = [20, 60, 99, 100, 101, 140];
    const late = judge(lots, ids);
    for (const [k, id] of ids.entries()) {
      const atOnce = judge(lots.slice(0, id + REACH + 2), [id])[0];
      expect(atOnce.isProvisional).toBe(false);
      expect(late[k]).toEqual(atOnce);
      // Other readings to come change nothing either.
      const otherFuture = lots.map((lot) => (lot.lotId > id + REACH ? onePointLot(lot.lotId, 50) : lot));
      expect(judge(otherFuture, [id])[0]).toEqual(atOnce);
    }
  });

  it('does change with a reading inside T_eff / 2', () => {
    const lots = channel(11);
    const before = judge(lots, [60])[0];
    lots[60 + REACH - 1] = onePointLot(60 + REACH - 1, 2.5);
    expect(judge(lots, [60])[0].score).not.toBe(before.score);
  });

  it('does not depend on which other lots are judged in the same call', () => {
    const lots = channel(12);
    const together = judge(
      lots,
      lots.map((lot) => lot.lotId),
    );
    for (const id of [50, 100, 215]) expect(judge(lots, [id])[0]).toEqual(together[id]);
  });

  it('does not depend on lots before its window', () => {
    const lots = channel(13);
    const plan = madePlan({ windowSeconds: 100 * SPACING });
    const all = judgeSegment({ plan, lots, lotIdsToJudge: [180], segmentStartsAt: 0, segmentEndsAt: null });
    const some = judgeSegment({
      plan,
      lots: lots.slice(95),
      lotIdsToJudge: [180],
      segmentStartsAt: 0,
      segmentEndsAt: null,
    });
    expect(some.lots[0]).toEqual(all.lots[0]);
  });

  it('stays provisional until later data reach T_eff / 2 past the lot', () => {
    const lots = channel(11);
    expect(judge(lots.slice(0, 60 + REACH), [60])[0].isProvisional).toBe(true);
    expect(judge(lots.slice(0, 60 + REACH + 2), [60])[0].isProvisional).toBe(false);
  });

  it('stays provisional while the later lots carry less than κ T_eff / 4', () => {
    const lots = channel(11).slice(0, 61);
    // After a pause of four days two lots: T_eff / 2 has passed, but the weight of nine is asked for.
    const [first, ...rest] = Array.from({ length: 12 }, (_, k) => onePointLot(109 + k, 0));
    expect(judge([...lots, first, rest[0]], [60])[0].isProvisional).toBe(true);
    const settled = judge([...lots, first, ...rest], [60])[0];
    expect(settled.isProvisional).toBe(false);
    expect(settled).toEqual({
      ...judge([...lots, first, rest[0]], [60])[0],
      isProvisional: false,
      signals: settled.signals,
    });
  });

  it('counts held lots neither as weight that settles nor in the fit', () => {
    const lots = channel(11).map((lot) => ({ ...lot, pulls: lot.lotId <= 60 }));
    expect(judge(lots, [60])[0].isProvisional).toBe(true);
  });

  it('comes at once in a closed segment', () => {
    const lots = channel(12).slice(0, 120);
    const judged = judge(
      lots,
      lots.map((lot) => lot.lotId),
      lots[119].lastAt + 1,
    );
    expect(judged.every((lot) => !lot.isProvisional)).toBe(true);
  });

  it('is outside for the lot that is out and not for its neighbours, whose fit it has left', () => {
    const lots = channel(12);
    const [before, out, after] = judge(lots, [99, 100, 101]);
    expect(out.controlState).toBe('outside_control_limits');
    const clean = judge(
      lots.map((lot) => ({ ...lot, pulls: lot.lotId !== 100 })),
      [99, 100, 101],
    );
    expect(clean[0].score).toBe(before.score);
    expect(clean[1].score).toBe(out.score);
    expect(clean[2].score).toBe(after.score);
  });

  it('of a lot longer than the span between break and window still includes that lot', () => {
    const lots = channel(11);
    const long = { ...lots[30], firstAt: lots[30].firstAt, lastAt: lots[30].lastAt + DAY };
    lots[30] = long;
    expect(judge(lots, [30])[0].score).not.toBeNull();
  });
});
