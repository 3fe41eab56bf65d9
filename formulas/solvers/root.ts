/**
 * Bracketed root — where a continuous function crosses zero between two points at which its signs differ.
 *
 * Inputs: a function of one number; the two ends of the bracket; tolerance in the unit of the root; iteration limit.
 * Result: { value, iterations }; the root lies within the tolerance of the value (a few units in the last place at
 *   best). The root never leaves the bracket.
 * Outside the valid range: throws DivergedError without a sign change, at the iteration limit, or where the function
 *   gives no number.
 * Source: Chandrupatla, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function without
 *   using derivatives, Adv Eng Softw 1997;28:145-149 [M].
 * Erratum / variant: the published step, with the tolerance given by the caller plus four units in the last place.
 */
import { DivergedError } from './diverged-error';

export interface Root {
  value: number;
  iterations: number;
}

export interface RootSearch {
  low: number;
  high: number;
  tolerance: number;
  iterationLimit?: number;
}

interface Point {
  at: number;
  value: number;
}

const ITERATION_LIMIT = 100;

export function findRoot(valueAt: (at: number) => number, search: RootSearch): Root {
  const limit = search.iterationLimit ?? ITERATION_LIMIT;
  const pointAt = (at: number, iterations: number) => ({ at, value: checked(valueAt(at), iterations) });
  let near = pointAt(search.high, 0);
  let far = pointAt(search.low, 0);
  if (near.value === 0) return { value: near.at + 0, iterations: 0 };
  if (far.value === 0) return { value: far.at + 0, iterations: 0 };
  if (near.value > 0 === far.value > 0) throw new DivergedError('no sign change', 0);
  let share = 0.5;
  for (let iterations = 1; iterations <= limit; iterations += 1) {
    const next = pointAt(near.at + share * (far.at - near.at), iterations);
    let previous = near;
    if (next.value > 0 !== near.value > 0) {
      previous = far;
      far = near;
    }
    near = next;
    const best = Math.abs(near.value) < Math.abs(far.value) ? near : far;
    const least = (search.tolerance + 4 * Number.EPSILON * Math.abs(best.at)) / Math.abs(far.at - near.at);
    // The bracket is narrower than twice the tolerance, or the root is met exactly.
    if (best.value === 0 || least > 0.5) return { value: best.at + 0, iterations };
    share = Math.min(1 - least, Math.max(least, nextShare(near, far, previous)));
  }
  throw new DivergedError('iteration limit', limit);
}

/** Inverse quadratic interpolation where the paper's condition says that it is safe, else the middle. */
function nextShare(near: Point, far: Point, previous: Point): number {
  const xi = (near.at - far.at) / (previous.at - far.at);
  const phi = (near.value - far.value) / (previous.value - far.value);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  const first = (near.value / (far.value - near.value)) * (previous.value / (far.value - previous.value));
  const second =
    ((previous.at - near.at) / (far.at - near.at)) *
    (near.value / (previous.value - near.value)) *
    (far.value / (previous.value - far.value));
  return first + second;
}

function checked(value: number, iterations: number): number {
  if (Number.isNaN(value)) throw new DivergedError('not a number', iterations);
  return value;
}
