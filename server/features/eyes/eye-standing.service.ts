/** Where eyes stand on their way, with the flags that hold them up. For one eye or for a page of patients. */
import { EYE_STAGE_WORDS, type Eye, type EyeStage, type Flag, type Measurement } from '@/shared/contract';
import { checkMeasurements } from '@/shared/clinical/measurement-checks';
import type { Transaction } from '@/server/db/write-queue';
import { listMeasurements, ofRecord } from '@/server/features/measurements/measurement.service';
import { listLenses } from '@/server/features/lenses/lens.service';
import { listPatientsById } from '@/server/features/patients/patient-record.service';
import { outOfDateReasons, type PresentFacts } from '@/server/features/plans/out-of-date';
import { readFrozen } from '@/server/features/plans/signed-snapshot';
import { findPlanStates, type PlanState } from './plan-state.repository';
import { listSettlements, type Settlement } from './settlement.repository';

export interface EyeStanding {
  eye: Eye;
  measurements: Measurement[];
  /** Each with its settlement, if it has one. */
  flags: Flag[];
  stage: EyeStage;
  waitsFor: string;
}

export interface StandingRequest {
  /** Both eyes of each patient: flags compare the two. */
  eyes: readonly Eye[];
  /** ISO date. */
  today: string;
}

export async function findStandings(
  { eyes, today }: StandingRequest,
  transaction?: Transaction,
): Promise<EyeStanding[]> {
  const ids = eyes.map(({ id }) => id);
  const [measurements, settlements, plans, patients] = await Promise.all([
    listMeasurements(eyes, transaction),
    listSettlements(ids, transaction),
    findPlanStates(ids, transaction),
    listPatientsById([...new Set(eyes.map(({ patientId }) => patientId))], transaction),
  ]);
  // Only a signature has to be compared with the catalogue.
  const isAnySigned = [...plans.values()].some(({ signed }) => signed);
  const lenses = isAnySigned ? await listLenses(transaction) : [];
  return eyes.map((eye) => {
    const fellow = eyes.find(({ patientId, side }) => patientId === eye.patientId && side !== eye.side);
    const measurement = ofRecord(measurements.get(eye.id));
    const fellowMeasurement = ofRecord(fellow && measurements.get(fellow.id));
    const patient = patients.find(({ id }) => id === eye.patientId);
    if (!patient) throw new Error('An eye without a patient');
    const question = { fellowMeasurement, eye, fellowEye: fellow ?? null, patient, today };
    const raised = measurement ? checkMeasurements({ measurement, ...question }) : [];
    const settled = settlements.filter(({ eyeId }) => eyeId === eye.id);
    const flags = raised.map((flag) => ({ ...flag, settlement: settlementOf(flag, measurement, settled) }));
    const present = { patient, eye, measurements: measurements.get(eye.id) ?? [], lenses };
    const stage = stageOf({ measurement, flags, plan: plans.get(eye.id), present });
    return {
      eye,
      measurements: measurements.get(eye.id) ?? [],
      flags,
      stage,
      waitsFor: waitsFor(stage, flags),
    };
  });
}

/** A settlement counts for the measurement that it was given for, and no other. */
function settlementOf(
  { ruleId }: Pick<Flag, 'ruleId'>,
  measurement: Measurement | null,
  settlements: readonly Settlement[],
): Flag['settlement'] {
  const found = settlements.find(
    (one) => one.ruleId === ruleId && one.measurementId === (measurement?.id ?? null),
  );
  return found ? { by: found.by, at: found.at, reason: found.reason } : null;
}

const isOpenStop = ({ severity, settlement }: Flag): boolean => severity === 'stop' && settlement === null;

interface StageFacts {
  measurement: Measurement | null;
  flags: readonly Flag[];
  plan: PlanState | undefined;
  present: PresentFacts;
}

function stageOf({ measurement, flags, plan, present }: StageFacts): EyeStage {
  if (plan?.signed) {
    return outOfDateReasons(readFrozen(plan.signed), present).length === 0 ? 'signed' : 'out-of-date';
  }
  if (!measurement) return 'measure';
  if (flags.some(isOpenStop)) return 'check';
  return plan?.hasDraft ? 'sign' : 'plan';
}

/** The first open stop says it better than the stage. */
function waitsFor(stage: EyeStage, flags: readonly Flag[]): string {
  const stop = stage === 'check' ? flags.find(isOpenStop) : undefined;
  return stop?.message ?? EYE_STAGE_WORDS[stage];
}
