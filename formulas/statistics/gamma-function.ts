/**
 * Log-gamma — the logarithm of the gamma function, for the distributions of this folder.
 *
 * Inputs: x, positive.
 * Result: ln of gamma(x), relative error below 1e-13.
 * Outside the valid range: throws OutOfRangeError for x that is not positive.
 * Source: Lanczos, SIAM J Numer Anal 1964;1:86-96, with g = 7 and nine terms [M].
 * Erratum / variant: the coefficients in circulation for g = 7; R and jstat agree.
 */
import { checkRange } from '../limits';

const POSITIVE = { min: Number.MIN_VALUE, max: Number.MAX_VALUE };
const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

export function logGamma(x: number): number {
  checkRange('x', x, POSITIVE);
  // Reflection keeps the series where it is accurate.
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  let series = LANCZOS[0] ?? NaN;
  for (let term = 1; term < LANCZOS.length; term += 1) series += (LANCZOS[term] ?? NaN) / (x - 1 + term);
  const shifted = x + 6.5;
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(shifted) - shifted + Math.log(series);
}
