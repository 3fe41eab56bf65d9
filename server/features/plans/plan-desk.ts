/** The desk of a plan from its facts: for a draft calculated now, for a signed plan as it was frozen. Pure. */
import type { Plan, PlanDesk } from '@/shared/contract';
import { calculatePlan } from '@/shared/clinical/plan-calculation';
import { ProblemError } from '@/server/http/problem';
import { outOfDateReasons, reasonsSinceSigning } from './out-of-date';
import { blockersOf } from './plan-blockers';
import type { EyeFacts } from './plan-facts.service';
import type { StoredPlan } from './plan.repository';
import { digestOf, readFrozen } from './signed-snapshot';

export function deskOf(stored: StoredPlan, facts: EyeFacts): PlanDesk {
  const desk = stored.snapshot === null ? draftDesk(stored, facts) : signedDesk(stored, facts);
  return { ...desk, shownDigest: shownDigestOf(desk) };
}

type Shown = Omit<PlanDesk, 'shownDigest'>;

/** Of everything that a signature would freeze: whoever signs proves to have seen it. */
function shownDigestOf({ patient, eye, measurement, calculation }: Shown): string {
  return digestOf(JSON.stringify([patient, eye, measurement, calculation]));
}

/** A replaced plan is history: it is not called out of date. */
export function reasonsOf(stored: StoredPlan, facts: EyeFacts): string[] {
  return stored.status === 'signed' ? reasonsSinceSigning(stored, facts) : [];
}

function toPlan(stored: StoredPlan, { patient, eye }: EyeFacts, outOfDateReasons: string[]): Plan {
  const { eyeId: _eyeId, snapshot: _snapshot, actedAt: _actedAt, ...plan } = stored;
  return { ...plan, patientId: patient.id, side: eye.side, outOfDateReasons };
}

function signedDesk(stored: StoredPlan, facts: EyeFacts): Shown {
  const frozen = readFrozen(stored);
  const reasons = stored.status === 'signed' ? outOfDateReasons(frozen, facts) : [];
  return {
    plan: toPlan(stored, facts, reasons),
    patient: frozen.patient,
    eye: frozen.eye,
    measurement: frozen.measurement,
    measurements: [frozen.measurement],
    lenses: frozen.lenses,
    calculation: frozen.calculation,
    blockers: [],
  };
}

function draftDesk(stored: StoredPlan, facts: EyeFacts): Shown {
  const { input, choice } = stored;
  const { patient, eye, measurements } = facts;
  const measurement = measurements.find(({ id }) => id === input.measurementId);
  if (!measurement) throw new ProblemError('conflict', 'The measurement of this draft is not there any more');
  const lenses = input.lensIds.flatMap((id) => facts.lenses.filter((lens) => lens.id === id));
  const flags = facts.flagsOf(measurement);
  const calculation = calculatePlan({ eye, measurement, lenses, input, flags, choice });
  return {
    plan: toPlan(stored, facts, []),
    patient,
    eye,
    measurement,
    measurements,
    lenses: facts.lenses.filter((lens) => !lens.isRetired || input.lensIds.includes(lens.id)),
    calculation,
    blockers: blockersOf({ choice, measurement, lenses, calculation }),
  };
}
