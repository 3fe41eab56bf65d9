/** jstat comes without types; only what the tests compare with. */
declare module 'jstat' {
  export const jStat: {
    normal: { cdf(x: number, mean: number, sd: number): number };
    studentt: { cdf(t: number, degreesOfFreedom: number): number };
    centralF: { cdf(f: number, numerator: number, denominator: number): number };
    chisquare: { cdf(x: number, degreesOfFreedom: number): number };
    ibeta(x: number, first: number, second: number): number;
    gammaln(x: number): number;
  };
}
