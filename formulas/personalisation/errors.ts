/** The ways in which personalising a constant refuses. */
import type { MeasurementOrigin } from './origin';

/** Optical and ultrasound axial lengths differ by how they were measured: one constant cannot serve both. */
export class MixedOriginsError extends Error {
  override readonly name = 'MixedOriginsError';
  readonly caseIndex: number;
  readonly expected: MeasurementOrigin;
  readonly found: MeasurementOrigin;

  constructor(caseIndex: number, expected: MeasurementOrigin, found: MeasurementOrigin) {
    super(`Case ${caseIndex} was measured by ${found}; this constant is for ${expected} biometry`);
    this.caseIndex = caseIndex;
    this.expected = expected;
    this.found = found;
  }
}

/** One case that a formula refuses; the cause says why. Nothing is left out silently. */
export class UnusableCaseError extends Error {
  override readonly name = 'UnusableCaseError';
  readonly caseIndex: number;

  constructor(caseIndex: number, cause: unknown) {
    super(`Case ${caseIndex}: ${cause instanceof Error ? cause.message : String(cause)}`, { cause });
    this.caseIndex = caseIndex;
  }
}

/** No constant within its limits makes the mean error zero. */
export class NoConstantError extends Error {
  override readonly name = 'NoConstantError';
  readonly formula: string;

  constructor(formula: string, reason: string) {
    super(`No constant of ${formula} brings the mean error to zero: ${reason}`);
    this.formula = formula;
  }
}
