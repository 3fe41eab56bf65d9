/** jstat comes without types; only what the tests compare with. */
declare module 'jstat' {
  export const jStat: { normal: { cdf(x: number, mean: number, sd: number): number } };
}
