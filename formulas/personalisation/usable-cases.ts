/** Which cases a formula can take, and why it refuses the others: to be shown beside the count, never hidden. */
import { usableEye } from './cohort';
import { UnusableCaseError } from './errors';
import type { CohortQuestion, OutcomeCase } from './cohort';

export interface SortedCases {
  usable: OutcomeCase[];
  /** Each with the place of its case in the list given. */
  refused: UnusableCaseError[];
}

export function sortCases(question: CohortQuestion): SortedCases {
  const sorted: SortedCases = { usable: [], refused: [] };
  question.cases.forEach((one, index) => {
    try {
      usableEye(question, one, index);
      sorted.usable.push(one);
    } catch (error) {
      if (!(error instanceof UnusableCaseError)) throw error;
      sorted.refused.push(error);
    }
  });
  return sorted;
}
