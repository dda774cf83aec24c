/** The part of jstat that is used here; the package ships no types. */
declare module 'jstat' {
  interface StudentT {
    /** Distribution function at x. */
    cdf(x: number, degreesOfFreedom: number): number;
    /** Quantile at probability p. */
    inv(p: number, degreesOfFreedom: number): number;
  }
  interface StandardNormal {
    cdf(x: number, mean: number, standardDeviation: number): number;
    inv(p: number, mean: number, standardDeviation: number): number;
  }
  export const jStat: { studentt: StudentT; normal: StandardNormal };
}
