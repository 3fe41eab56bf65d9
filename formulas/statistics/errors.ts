/** Fewer values than a statistic needs: there is no number to show, and none is made up. */
export class TooFewValuesError extends Error {
  override readonly name = 'TooFewValuesError';
  readonly statistic: string;
  readonly count: number;
  readonly needed: number;

  constructor(statistic: string, count: number, needed: number) {
    super(`${statistic} needs at least ${needed} values; given: ${count}`);
    this.statistic = statistic;
    this.count = count;
    this.needed = needed;
  }
}

/** Two lists that belong together eye by eye but differ in length. */
export class UnequalLengthsError extends Error {
  override readonly name = 'UnequalLengthsError';
  readonly statistic: string;

  constructor(statistic: string, first: number, second: number) {
    super(`${statistic} needs two lists of one length; given: ${first} and ${second}`);
    this.statistic = statistic;
  }
}

/** Values without the scatter that a statistic divides by. */
export class DegenerateDataError extends Error {
  override readonly name = 'DegenerateDataError';
  readonly statistic: string;

  constructor(statistic: string, reason: string) {
    super(`${statistic} is not defined here: ${reason}`);
    this.statistic = statistic;
  }
}
