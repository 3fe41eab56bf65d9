export type DivergenceReason = 'no sign change' | 'iteration limit' | 'not a number';

/** A search that found nothing it could vouch for. It never answers with its last guess. */
export class DivergedError extends Error {
  override readonly name = 'DivergedError';
  readonly reason: DivergenceReason;
  readonly iterations: number;

  constructor(reason: DivergenceReason, iterations: number) {
    super(`The search ended without a root: ${reason} after ${iterations} steps`);
    this.reason = reason;
    this.iterations = iterations;
  }
}
