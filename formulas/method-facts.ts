/**
 * How far a statistic or a rule of personalisation has been checked, as data: the method page shows it beside the
 * facts of the formulas, with the same marks and one more.
 */
import { markMeanings } from './facts-types';
import type { Mark } from './facts-types';

export type MethodMark = Mark | 'CP';

export const methodMarkMeanings: Record<MethodMark, string> = {
  ...markMeanings,
  CP: 'common practice or a decision of this product, without a published source',
};

export interface MethodFacts {
  /** Folder and file, without the ending. */
  id: string;
  name: string;
  equations: readonly { text: string; mark: MethodMark }[];
  /** The first is the one that the docblock names. */
  sources: readonly { citation: string; mark: MethodMark }[];
  validRange: string;
  /** What the tests compare with. */
  checks: readonly string[];
  notKnown: readonly string[];
}
