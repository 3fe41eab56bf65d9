/**
 * Normal distribution — probability up to z standard deviations.
 *
 * Inputs: z, any number.
 * Result: 0 to 1, absolute error below 1e-14.
 * Outside the valid range: defined everywhere; 0 and 1 beyond 9 standard deviations.
 * Source: Marsaglia, Evaluating the Normal Distribution, J Stat Softw 2004;11(4): Phi(z) = 1/2 + phi(z) (z + z^3/3 +
 *   z^5/(3 5) + ...) [M]; the series is the Taylor expansion of the Mills ratio [D].
 * Erratum / variant: none; the tests compare with two libraries.
 */
const SQRT_TWO_PI = Math.sqrt(2 * Math.PI);

export function normalCdf(z: number): number {
  if (z < -9) return 0;
  if (z > 9) return 1;
  let term = z;
  let sum = z;
  for (let odd = 3; Math.abs(term) > 1e-18 * Math.abs(sum); odd += 2) {
    term *= (z * z) / odd;
    sum += term;
  }
  return 0.5 + (sum * Math.exp(-0.5 * z * z)) / SQRT_TWO_PI;
}
