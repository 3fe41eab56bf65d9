/** What every statistic asks of its values before it looks at them. */
import { OutOfRangeError } from '../errors';
import { checkRange } from '../limits';
import { TooFewValuesError, UnequalLengthsError } from './errors';

const ANY_NUMBER = { min: -Number.MAX_VALUE, max: Number.MAX_VALUE };
const SHARE = { min: Number.MIN_VALUE, max: 1 - Number.EPSILON / 2 };

/** A list of numbers, or a typed one. */
export type Values = readonly number[] | Float64Array;

export function checkValues(statistic: string, values: Values, needed: number): void {
  if (values.length < needed) throw new TooFewValuesError(statistic, values.length, needed);
  for (const value of values) {
    if (!Number.isFinite(value)) throw new OutOfRangeError(`${statistic}: value`, value, ANY_NUMBER);
  }
}

export function checkPairs(statistic: string, first: readonly unknown[], second: readonly unknown[]): void {
  if (first.length !== second.length) {
    throw new UnequalLengthsError(statistic, first.length, second.length);
  }
}

/** A confidence or a probability strictly between 0 and 1. */
export function checkShare(name: string, share: number): void {
  checkRange(name, share, SHARE);
}

/** A count of something: a whole number from min on. */
export function checkCount(name: string, count: number, min: number): void {
  const range = { min, max: Number.MAX_SAFE_INTEGER };
  if (!Number.isInteger(count)) throw new OutOfRangeError(name, count, range);
  checkRange(name, count, range);
}
