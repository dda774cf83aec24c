import { judgeSegment } from './judge-segment';
import { proposePlan } from './propose-plan';
import { DAY, START_AT } from './testing/made-lots';
import { normals, uniforms } from './testing/seeded-random';
import { simulatedLots } from './testing/simulated-lots';
import type { LotJudgement, LotOnChannel } from './types';

const LOTS = 600;
const REFERENCE_LOTS = 100;
const LOTS_PER_SHIFT = 4;
/** Lots are decided this many shifts after they were held: good ones are released, planted ones scrapped. */
const DECIDED_AFTER_SHIFTS = 3;
const SEEDS = [101, 202, 303, 404];
/** A lot mean's own variance: 0.64 + 3.6 / 10 = 1. */
const COMPONENTS = { betweenLots: 0.64, betweenPoints: 0, betweenReadings: 3.6 };
/** In lot-mean standard deviations. */
const DRIFT_RANGE = 5;
const PLANTED_SHIFT = 7;

/** A wave of 17 days with a range of 5 lot-mean standard deviations at a chance phase, and bad lots of ±7 in it. */
function generated(seed: number) {
  const uniform = uniforms(seed);
  const phase = 2 * Math.PI * uniform();
  const driftAt = (seconds: number) => (DRIFT_RANGE / 2) * Math.sin((2 * Math.PI * seconds) / (17 * DAY) + phase);
  const shape = { lotCount: LOTS, pointsPerLot: 1, readingsPerPoint: 10, components: COMPONENTS };
  const lots = simulatedLots({ ...shape, driftAt, normal: normals(seed + 1) });
  const planted = new Map<number, number>();
  for (let j = REFERENCE_LOTS + 10; j < LOTS; j += 25 + Math.floor(20 * uniform())) {
    const shift = uniform() < 0.5 ? -PLANTED_SHIFT : PLANTED_SHIFT;
    planted.set(j, shift);
    lots[j].points[0].mean += shift;
  }
  return { lots, planted };
}

/** Feeds the lots shift by shift; every hold of a provisional or settled verdict counts. */
function run(seed: number) {
  const { lots, planted } = generated(seed);
  const proposal = proposePlan({ lots: lots.slice(0, REFERENCE_LOTS) });
  if (proposal.status !== 'proposed') throw new Error(proposal.detail);
  const heldInShift = new Map<number, number>();
  const settled = new Map<number, LotJudgement>();
  for (let known = REFERENCE_LOTS; known <= LOTS; known += LOTS_PER_SHIFT) {
    const shift = known / LOTS_PER_SHIFT;
    const seen: LotOnChannel[] = lots.slice(0, known).map((lot) => {
      const held = heldInShift.get(lot.lotId);
      const isDecided = held !== undefined && shift >= held + DECIDED_AFTER_SHIFTS;
      return { ...lot, pulls: held === undefined || (isDecided && !planted.has(lot.lotId)) };
    });
    const open = seen.filter((lot) => !settled.has(lot.lotId)).map((lot) => lot.lotId);
    const judgement = judgeSegment({
      plan: proposal.plan,
      lots: seen,
      lotIdsToJudge: open,
      segmentStartsAt: START_AT,
      segmentEndsAt: null,
    });
    for (const lot of judgement.lots) {
      if (lot.signals.some(({ action }) => action === 'holds') && !heldInShift.has(lot.lotId))
        heldInShift.set(lot.lotId, shift);
      if (!lot.isProvisional) settled.set(lot.lotId, lot);
    }
  }
  const later = lots.filter((lot) => lot.lotId >= REFERENCE_LOTS);
  const good = later.filter((lot) => !planted.has(lot.lotId));
  const planting = [...planted].flatMap(([lotId, shift]) => {
    const verdict = settled.get(lotId);
    return verdict ? [{ lotId, ownSds: Math.abs(shift) / verdict.residualSd!, isHeld: heldInShift.has(lotId) }] : [];
  });
  const judged = good.filter((lot) => settled.has(lot.lotId));
  const outByConstant = judged.filter((lot) => settled.get(lot.lotId)?.constant.state === 'outside_control_limits');
  return {
    goodHeld: { of: good.length, are: good.filter((lot) => heldInShift.has(lot.lotId)).length },
    goodOutByConstant: { of: judged.length, are: outByConstant.length },
    planting,
  };
}

/** 2,000 lots: with good lots held at 0.8 % on the average of many seeds, 1.5 % of them is three standard errors away. */
const MOST_GOOD_HELD = 0.015;
/** One seed has 500 lots and one reference period: chance alone takes one in five above 1.5 %, hardly one in a hundred above 3 %. */
const MOST_GOOD_HELD_IN_ONE = 0.03;

describe('a channel that drifts by five lot-mean standard deviations', () => {
  const runs = SEEDS.map((seed) => ({ seed, ...run(seed) }));
  const shareOf = (counts: { of: number; are: number }[]) =>
    counts.reduce((sum, { are }) => sum + are, 0) / counts.reduce((sum, { of }) => sum + of, 0);

  it('has at most 1.5 % of its good lots ever held with the slow movement removed', () => {
    expect(shareOf(runs.map(({ goodHeld }) => goodHeld))).toBeLessThanOrEqual(MOST_GOOD_HELD);
    for (const { goodHeld } of runs) expect(shareOf([goodHeld])).toBeLessThanOrEqual(MOST_GOOD_HELD_IN_ONE);
  });

  it.each(runs)('has 10 % or more of them outside by the constant yardstick (seed $seed)', ({ goodOutByConstant }) => {
    expect(shareOf([goodOutByConstant])).toBeGreaterThanOrEqual(0.1);
  });

  it.each(runs)('has every bad lot of 6 or more of its own standard deviations held (seed $seed)', ({ planting }) => {
    const plain = planting.filter(({ ownSds }) => ownSds >= 6);
    expect(plain.length).toBeGreaterThanOrEqual(8);
    expect(plain.filter(({ isHeld }) => !isHeld)).toEqual([]);
  });
});
