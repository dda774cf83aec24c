import { ControlError } from './control-error';
import { falseShare, holdLimit } from './hold-limit';

// R 4.2: 2 * pt(-3, nu) and qt(1 - 1 / (2 * 504), nu).
const FROM_R = [
  { nu: 5, shareAtThree: 0.0300992478974626, limitForOne: 5.903969956278214 },
  { nu: 14.4, shareAtThree: 0.00930842169556746, limitForOne: 3.76847470737390777 },
  { nu: 24, shareAtThree: 0.00620573661652474, limitForOne: 3.47000478109423893 },
  { nu: 99, shareAtThree: 0.00341550792157887, limitForOne: 3.17715389226841216 },
];
/** 84 lots a week on 3 channels, two looks each: 504. */
const PLANT = { lotsPerWeek: 84, channels: 3 };

describe('hold limit', () => {
  it.each(FROM_R)('agrees with R at $nu degrees of freedom', ({ nu, shareAtThree, limitForOne }) => {
    const byMultiple = holdLimit({ by: { multiple: 3 }, ...PLANT, degreesOfFreedom: nu });
    expect(byMultiple.limit).toBe(3);
    expect(Math.abs(byMultiple.falseHoldShare - shareAtThree)).toBeLessThan(1e-9);
    expect(byMultiple.falseHoldsPerWeek).toBeCloseTo(504 * shareAtThree, 6);
    const byBudget = holdLimit({ by: { falseHoldsPerWeek: 1 }, ...PLANT, degreesOfFreedom: nu });
    expect(Math.abs(byBudget.limit - limitForOne)).toBeLessThan(1e-6);
  });

  it('comes back to the multiple through the budget that it costs', () => {
    const there = holdLimit({ by: { multiple: 3.3 }, ...PLANT, degreesOfFreedom: 40 });
    const back = holdLimit({
      by: { falseHoldsPerWeek: there.falseHoldsPerWeek },
      ...PLANT,
      degreesOfFreedom: 40,
    });
    expect(back.limit).toBeCloseTo(3.3, 8);
  });

  it('tends to the normal share of 0.27 % with ever more reference lots', () => {
    expect(falseShare(3, 1e7)).toBeCloseTo(0.0026998, 6);
  });

  it('refuses a budget above the number of looks and numbers that are not above 0', () => {
    const asked = (by: { multiple: number } | { falseHoldsPerWeek: number }, degreesOfFreedom = 24) => {
      return () => holdLimit({ by, ...PLANT, degreesOfFreedom });
    };
    for (const wrong of [
      asked({ falseHoldsPerWeek: 504 }),
      asked({ falseHoldsPerWeek: 0 }),
      asked({ multiple: -1 }),
      asked({ multiple: NaN }),
      asked({ multiple: 3 }, 0),
      asked({ multiple: 3 }, NaN),
    ])
      expect(wrong).toThrow(ControlError);
  });
});
