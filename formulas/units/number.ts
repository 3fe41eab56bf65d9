import { OutOfRangeError } from '../errors';

const ANY_NUMBER = { min: -Number.MAX_VALUE, max: Number.MAX_VALUE };

/** A result as it may leave the door: finite, and never minus zero (which would print as "-0.00"). */
export function finite(name: string, value: number): number {
  if (!Number.isFinite(value)) throw new OutOfRangeError(name, value, ANY_NUMBER);
  return value + 0; // -0 + 0 is 0
}
