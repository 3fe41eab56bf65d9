/**
 * Regularised incomplete beta function — the tail behind Student's t, F and the binomial.
 *
 * Inputs: x from 0 to 1; the two shapes, positive.
 * Result: 0 to 1, relative error below 1e-10 for shapes up to 10,000.
 * Outside the valid range: throws OutOfRangeError for x beyond 0 to 1, DivergedError where the fraction does not settle.
 * Source: NIST Digital Library of Mathematical Functions, 8.17.22 (continued fraction) [M]; evaluated as Lentz, Appl
 *   Opt 1976;15:668-671 [M].
 * Erratum / variant: beyond (a + 1)/(a + b + 2) the mirrored function is computed, where the fraction converges fast.
 */
import { checkRange } from '../limits';
import { DivergedError } from '../solvers/diverged-error';
import { logGamma } from './gamma-function';

const ITERATION_LIMIT = 10_000;
const TINY = 1e-300;

export interface BetaShapes {
  first: number;
  second: number;
}

export function incompleteBeta(x: number, shapes: BetaShapes): number {
  checkRange('x', x, { min: 0, max: 1 });
  if (x === 0 || x === 1) return x;
  const { first, second } = shapes;
  if (x > (first + 1) / (first + second + 2)) {
    return 1 - incompleteBeta(1 - x, { first: second, second: first });
  }
  const logFront =
    logGamma(first + second) -
    logGamma(first) -
    logGamma(second) +
    first * Math.log(x) +
    second * Math.log1p(-x);
  return (Math.exp(logFront) / first) * fraction(x, shapes);
}

function fraction(x: number, { first, second }: BetaShapes): number {
  let c = 1;
  let d = 1 / guarded(1 - ((first + second) * x) / (first + 1));
  let value = d;
  for (let step = 1; step <= ITERATION_LIMIT; step += 1) {
    const twice = first + 2 * step;
    const even = (step * (second - step) * x) / ((twice - 1) * twice);
    const odd = (-(first + step) * (first + second + step) * x) / (twice * (twice + 1));
    let change = 1;
    for (const term of [even, odd]) {
      d = 1 / guarded(1 + term * d);
      c = guarded(1 + term / c);
      change = c * d;
      value *= change;
    }
    if (Math.abs(change - 1) < 1e-15) return value;
  }
  throw new DivergedError('iteration limit', ITERATION_LIMIT);
}

/** Lentz: a denominator of zero is replaced by a tiny one. */
function guarded(denominator: number): number {
  return Math.abs(denominator) < TINY ? TINY : denominator;
}
