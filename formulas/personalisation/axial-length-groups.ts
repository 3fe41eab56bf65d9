/**
 * Errors by axial length — whether a constant that is right on average is right in short and in long eyes.
 *
 * Inputs: errorsD, D; axialLengthsMm, mm; clusters, the patient of each eye.
 * Result: four groups, below 22, 22 to 24.5, above 24.5 to 26, above 26 mm; each with count and, from two patients on, its
 *   summary.
 * Outside the valid range: throws UnequalLengthsError for lists that do not match.
 * Source: Hoffer et al., Am J Ophthalmol 2015;160:1086 (groups) [M]; a constant acts by the lens position and so changes the
 *   trend with axial length: Langenbucher 2023 [V].
 * Erratum / variant: for looking before a constant is taken up. Zeroing inside the groups is disputed and not done.
 */
import { checkPairs } from '../statistics/checks';
import { summariseErrors } from '../statistics/error-summary';
import type { Cluster } from '../statistics/clustered-mean';
import type { ErrorSummary } from '../statistics/error-summary';

export interface AxialLengthGroup {
  /** Not included, but for the 22 of the second group; absent: no limit. */
  aboveMm?: number;
  /** Included, but for the 22 of the first group; absent: no limit. */
  upToMm?: number;
  count: number;
  /** Null where fewer than two patients are in the group. */
  summary: ErrorSummary | null;
}

export interface GroupQuestion {
  errorsD: readonly number[];
  axialLengthsMm: readonly number[];
  clusters: readonly Cluster[];
}

const groups = [
  { upToMm: 22 },
  { aboveMm: 22, upToMm: 24.5 },
  { aboveMm: 24.5, upToMm: 26 },
  { aboveMm: 26 },
] as const;

export function groupByAxialLength(question: GroupQuestion): AxialLengthGroup[] {
  const { errorsD, axialLengthsMm, clusters } = question;
  checkPairs('errors by axial length', errorsD, axialLengthsMm);
  checkPairs('errors by axial length', errorsD, clusters);
  return groups.map((limits, group) => {
    const isIn = (_: unknown, eye: number) => groupOf(axialLengthsMm[eye] ?? NaN) === group;
    const patients = clusters.filter(isIn);
    const errors = errorsD.filter(isIn);
    const summary = new Set(patients).size < 2 ? null : summariseErrors(errors, patients);
    return { ...limits, count: errors.length, summary };
  });
}

function groupOf(axialLengthMm: number): number {
  if (axialLengthMm < 22) return 0;
  if (axialLengthMm <= 24.5) return 1;
  return axialLengthMm <= 26 ? 2 : 3;
}
