/** The desk of a plan from its facts: for a draft calculated now, for a signed plan as it was frozen. Pure. */
import type { Flag, Lens, Measurement, ModelCalculation, Plan, PlanDesk } from '@/shared/contract';
import { calculatePlan } from '@/shared/clinical/plan-calculation';
import { ProblemError } from '@/server/http/problem';
import { outOfDateReasons } from './out-of-date';
import type { EyeFacts } from './plan-facts.service';
import type { StoredPlan } from './plan.repository';
import { readFrozen } from './signed-snapshot';

export function deskOf(stored: StoredPlan, facts: EyeFacts): PlanDesk {
  return stored.snapshot === null ? draftDesk(stored, facts) : signedDesk(stored, facts);
}

export function toPlan(
  stored: StoredPlan,
  { patient, eye }: Pick<EyeFacts, 'patient' | 'eye'>,
  reasons: string[],
): Plan {
  const { eyeId: _eyeId, snapshot: _snapshot, actedAt: _actedAt, ...plan } = stored;
  return { ...plan, patientId: patient.id, side: eye.side, outOfDateReasons: reasons };
}

/** A replaced plan is history: it is not called out of date. */
export function reasonsOf(stored: StoredPlan, facts: EyeFacts): string[] {
  return stored.status === 'signed' ? outOfDateReasons(readFrozen(stored), facts) : [];
}

function signedDesk(stored: StoredPlan, facts: EyeFacts): PlanDesk {
  const frozen = readFrozen(stored);
  return {
    plan: toPlan(stored, facts, reasonsOf(stored, facts)),
    patient: frozen.patient,
    eye: frozen.eye,
    measurement: frozen.measurement,
    measurements: [frozen.measurement],
    lenses: frozen.lenses,
    calculation: frozen.calculation,
    blockers: [],
  };
}

function draftDesk(stored: StoredPlan, facts: EyeFacts): PlanDesk {
  const { input, choice } = stored;
  const measurement = facts.measurements.find(({ id }) => id === input.measurementId);
  if (!measurement) throw new ProblemError('conflict', 'The measurement of this draft is not there any more');
  const lenses = input.lensIds.flatMap((id) => facts.lenses.filter((lens) => lens.id === id));
  const calculation = calculatePlan({
    eye: facts.eye,
    measurement,
    lenses,
    input,
    flags: facts.flags,
    choice,
  });
  return {
    plan: toPlan(stored, facts, []),
    patient: facts.patient,
    eye: facts.eye,
    measurement,
    measurements: facts.measurements,
    lenses: facts.lenses.filter((lens) => !lens.isRetired || input.lensIds.includes(lens.id)),
    calculation,
    blockers: blockersOf({ stored, measurement, models: calculation.models, lenses, flags: facts.flags }),
  };
}

interface BlockerFacts {
  stored: StoredPlan;
  measurement: Measurement;
  models: readonly ModelCalculation[];
  lenses: readonly Lens[];
  flags: readonly Flag[];
}

/** What stands between the draft and a signature, in words. */
function blockersOf({ stored, measurement, models, lenses, flags }: BlockerFacts): string[] {
  const openStops = flags.filter(({ severity, settlement }) => severity === 'stop' && settlement === null);
  return [
    ...choiceBlockers(stored, models, lenses),
    ...(measurement.isOfRecord
      ? []
      : ['The measurement is not the newest of this eye: choose the one of record']),
    ...openStops.map(({ message }) => `Settle the stop: ${message}`),
  ];
}

function choiceBlockers(
  { choice }: StoredPlan,
  models: readonly ModelCalculation[],
  lenses: readonly Lens[],
): string[] {
  if (!choice) return ['Choose a lens and its power'];
  const model = models.find(({ lensId }) => lensId === choice.lensId);
  const hasResult = model?.candidates.some(({ powerD }) => powerD === choice.powerD) ?? false;
  const isRetired = lenses.find(({ id }) => id === choice.lensId)?.isRetired ?? true;
  return [
    ...(hasResult ? [] : ['No formula gives a result for the chosen lens and power']),
    ...(isRetired ? ['The chosen lens model is retired'] : []),
  ];
}
