/** What a new draft starts from, where nobody said otherwise. */
import {
  FORMULA_IDS,
  originForMethod,
  type Lens,
  type Measurement,
  type NewPlan,
  type PlanInput,
} from '@/shared/contract';
import { availablePowers } from '@/shared/clinical/candidate-powers';
import { ProblemError } from '@/server/http/problem';

/** A little nearsighted, so that a surprise seldom ends farsighted (common practice). */
export const USUAL_TARGET_D = -0.25;

export function draftInput(
  given: NewPlan,
  measurements: readonly Measurement[],
  lenses: readonly Lens[],
): PlanInput {
  const measurement = measurements.find(({ id, isOfRecord }) =>
    given.measurementId ? id === given.measurementId : isOfRecord,
  );
  if (!measurement)
    throw new ProblemError('conflict', 'This eye has no measurement to plan from: import or enter one first');
  const lensIds = given.lensIds ?? usualLenses(lenses, measurement);
  if (lensIds.length === 0)
    throw new ProblemError(
      'conflict',
      'The lens catalogue has no model to plan with: the administrator adds one',
    );
  return {
    measurementId: measurement.id,
    targetD: given.targetD ?? USUAL_TARGET_D,
    toleranceD: given.toleranceD ?? 0.5,
    formulas: given.formulas ?? [...FORMULA_IDS],
    leadingFormula: given.leadingFormula ?? null,
    lensIds,
    axialLengthAdjustment: given.axialLengthAdjustment ?? 'none',
    note: given.note ?? '',
  };
}

/** The plain one-piece monofocal made in most powers; failing that, any model in use with fitting constants. */
function usualLenses(lenses: readonly Lens[], measurement: Measurement): string[] {
  const origin = originForMethod(measurement.values.method);
  const inUse = lenses.filter(({ isRetired }) => !isRetired);
  const withConstants = inUse.filter(({ constants }) =>
    constants.some((constant) => constant.origin === origin),
  );
  const plain = withConstants.filter(
    ({ kind, isToric, design }) => kind === 'monofocal' && !isToric && design === 'one-piece',
  );
  const offered = [plain, withConstants, inUse].find((group) => group.length > 0) ?? [];
  const [widest] = [...offered].sort(
    (a, b) => availablePowers(b.powerRanges).length - availablePowers(a.powerRanges).length,
  );
  return widest ? [widest.id] : [];
}
