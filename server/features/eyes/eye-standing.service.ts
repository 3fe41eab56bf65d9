/** Where eyes stand on their way, with the flags that hold them up. For one eye or for a page of patients. */
import { EYE_STAGE_WORDS, type Eye, type EyeStage, type Flag, type Measurement } from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import { listLenses } from '@/server/features/lenses/lens.service';
import { ofRecord } from '@/server/features/measurements/measurement.service';
import { reasonsSinceSigning, type PresentFacts } from '@/server/features/plans/out-of-date';
import { findChecks, flagsOf } from './eye-checks.service';
import { findPlanStates, type PlanState } from './plan-state.repository';

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
  const [found, plans] = await Promise.all([
    findChecks(eyes, transaction),
    findPlanStates(
      eyes.map(({ id }) => id),
      transaction,
    ),
  ]);
  // Only a signature has to be compared with the catalogue.
  const isAnySigned = [...plans.values()].some(({ signed }) => signed);
  const lenses = isAnySigned ? await listLenses(transaction) : [];
  return found.map((checks) => {
    const { eye, patient, measurements } = checks;
    const measurement = ofRecord(measurements);
    const flags = flagsOf(checks, measurement, today);
    const present = { patient, eye, measurements, lenses };
    const stage = stageOf({ measurement, flags, plan: plans.get(eye.id), present });
    return { eye, measurements, flags, stage, waitsFor: waitsFor(stage, flags) };
  });
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
    return reasonsSinceSigning(plan.signed, present).length === 0 ? 'signed' : 'out-of-date';
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
