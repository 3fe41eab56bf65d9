/** What stands between a draft and a signature, in words. Pure. */
import type { Flag, Lens, Measurement, PlanCalculation, PlanChoice } from '@/shared/contract';

export interface BlockerFacts {
  choice: PlanChoice | null;
  measurement: Measurement;
  /** Those compared in the plan. */
  lenses: readonly Lens[];
  calculation: PlanCalculation;
}

export function blockersOf(facts: BlockerFacts): string[] {
  return [
    ...choiceBlockers(facts),
    ...measurementBlockers(facts.measurement),
    ...stopBlockers(facts.calculation.flags),
  ];
}

function choiceBlockers({ choice, lenses, calculation }: BlockerFacts): string[] {
  const lens = lenses.find(({ id }) => id === choice?.lensId);
  if (!choice || !lens) return ['Choose a lens and its power'];
  const model = calculation.models.find(({ lensId }) => lensId === choice.lensId);
  const hasResult = model?.candidates.some(({ powerD }) => powerD === choice.powerD) ?? false;
  return [
    ...(hasResult ? [] : ['No formula gives a result for the chosen lens and power']),
    ...(lens.isRetired ? ['The chosen lens model is retired'] : []),
    // A toric lens without its cylinder and axis is no order that anybody could fill.
    ...(lens.isToric
      ? [`${lens.name} is toric, and a plan does not hold its cylinder and axis: choose another model`]
      : []),
  ];
}

function measurementBlockers({ isOfRecord }: Measurement): string[] {
  return isOfRecord ? [] : ['The measurement is not the newest of this eye: choose the one of record'];
}

function stopBlockers(flags: readonly Flag[]): string[] {
  const open = flags.filter(({ severity, settlement }) => severity === 'stop' && settlement === null);
  return open.map(({ message, canBeSettled }) =>
    canBeSettled ? `Settle the stop: ${message}` : `${message}: no reason makes up for this stop`,
  );
}
