/**
 * The ways in which a formula refuses. Each names the input, so that a screen can point at the field.
 */
export interface Range {
  readonly min: number;
  readonly max: number;
}

/** An input (or a length computed from the inputs) outside its hard limits, or no number at all. */
export class OutOfRangeError extends Error {
  override readonly name = 'OutOfRangeError';
  readonly input: string;
  readonly value: number;
  /** The limit that was passed; the lower one when the value is not a number. */
  readonly limit: number;
  readonly range: Range;

  constructor(input: string, value: number, range: Range) {
    super(`${input} is ${value}; it must lie between ${range.min} and ${range.max}`);
    this.input = input;
    this.value = value;
    this.range = range;
    this.limit = value > range.max ? range.max : range.min;
  }
}

/** A formula needs a measurement that was not given. */
export class MissingInputError extends Error {
  override readonly name = 'MissingInputError';
  readonly input: string;
  readonly formula: string;

  constructor(input: string, formula: string) {
    super(`${formula} needs ${input}`);
    this.input = input;
    this.formula = formula;
  }
}

/** Constants of another formula. They are never converted in passing: a conversion has its own name. */
export class WrongConstantsError extends Error {
  override readonly name = 'WrongConstantsError';
  readonly input = 'constants';
  readonly formula: string;
  readonly expected: readonly string[];
  readonly given: readonly string[];

  constructor(formula: string, expected: readonly string[], given: readonly string[]) {
    super(`${formula} takes ${expected.join(', ')}; given: ${given.join(', ') || 'nothing'}`);
    this.formula = formula;
    this.expected = expected;
    this.given = given;
  }
}

/** A choice that does not exist, or that contradicts another. */
export class InvalidOptionError extends Error {
  override readonly name = 'InvalidOptionError';
  readonly input: string;
  readonly value: string;

  constructor(input: string, value: unknown, reason = 'is not one of the choices') {
    super(`${input} "${String(value)}" ${reason}`);
    this.input = input;
    this.value = String(value);
  }
}
