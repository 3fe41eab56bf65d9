/** Whether two descriptions of a model say the same. Pure. */
import type { LensConstant, LensInput } from '@/shared/contract';

/** Fields in which the input differs from what is stored; none when nothing would change. */
export function changedFields(stored: LensInput, input: LensInput): (keyof LensInput)[] {
  return FIELDS.filter((field) => comparable(field, stored) !== comparable(field, input));
}

const FIELDS = [
  'name',
  'kind',
  'isToric',
  'design',
  'powerRanges',
  'cylinderStepsD',
  'constants',
  'remarks',
  'isRetired',
] as const satisfies readonly (keyof LensInput)[];

function comparable(field: keyof LensInput, lens: LensInput): string {
  return JSON.stringify(field === 'constants' ? lens.constants.map(constantText).sort() : lens[field]);
}

/** Everything about a constant in a fixed order, so that equal ones are equal texts. */
export function constantText({ formula, origin, values, source, dated }: LensConstant): string {
  return JSON.stringify([formula, origin, Object.entries(values).sort(), source, dated]);
}
