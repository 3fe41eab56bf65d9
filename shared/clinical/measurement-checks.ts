/**
 * The check step: flags from published criteria and common practice, each with its source and mark. Three
 * severities: a stop is settled by name before a signature, a weigh is acknowledged, a note informs.
 */
import type { Flag } from '@/shared/contract';
import { BETWEEN_EYES_RULES } from './between-eyes-rules';
import { CHAMBER_AND_LENS_RULES } from './chamber-and-lens-rules';
import { checkFacts } from './check-facts';
import type { CheckQuestion, CheckRule } from './check-facts';
import { HISTORY_RULES } from './history-rules';
import { LENGTH_AND_CORNEA_RULES } from './length-and-cornea-rules';
import { RECORD_RULES } from './record-rules';

export type { CheckQuestion };

export const CHECK_RULES: readonly CheckRule[] = [
  ...HISTORY_RULES,
  ...BETWEEN_EYES_RULES,
  ...LENGTH_AND_CORNEA_RULES,
  ...CHAMBER_AND_LENS_RULES,
  ...RECORD_RULES,
];

/** Flags in the order of the rules; none is settled yet. */
export function checkMeasurements(question: CheckQuestion): Flag[] {
  const facts = checkFacts(question);
  return CHECK_RULES.flatMap(({ id, source, mark, canBeSettled = true, judge }) => {
    const finding = judge(facts);
    return finding ? [{ ruleId: id, source, mark, canBeSettled, settlement: null, ...finding }] : [];
  });
}
