/** What the plans of some eyes have to be compared with: patients, eyes, measurements, flags, catalogue. */
import {
  localDateOf,
  type Eye,
  type Flag,
  type Lens,
  type Measurement,
  type Patient,
} from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import { findChecks, flagsOf, type EyeChecks } from '@/server/features/eyes/eye-checks.service';
import { findPairOf, listPairsOf } from '@/server/features/eyes/eye-record.service';
import { listLenses } from '@/server/features/lenses/lens.service';
import { ProblemError } from '@/server/http/problem';

export interface EyeFacts {
  patient: Patient;
  eye: Eye;
  /** Newest first. */
  measurements: Measurement[];
  lenses: Lens[];
  /** Flags that one of the measurements raises today. */
  flagsOf: (measurement: Measurement) => Flag[];
}

/** Everything about one eye that a plan needs. `at` is the ISO moment that counts as now. */
export async function factsOfEye(eyeId: string, at: string, transaction?: Transaction): Promise<EyeFacts> {
  const [pair, lenses] = await Promise.all([findPairOf(eyeId, transaction), listLenses(transaction)]);
  const found = await findChecks(pair, transaction);
  const checks = found.find(({ eye }) => eye.id === eyeId);
  if (!checks) throw new ProblemError('not-found');
  return toFacts(checks, lenses, at);
}

/** The same for a page of plans, by the eye's id, in a handful of reads. */
export async function factsOfEyes(eyeIds: readonly string[], at: string): Promise<Map<string, EyeFacts>> {
  const [pairs, lenses] = await Promise.all([listPairsOf(eyeIds), listLenses()]);
  const found = await findChecks(pairs);
  return new Map(found.map((checks) => [checks.eye.id, toFacts(checks, lenses, at)]));
}

function toFacts(checks: EyeChecks, lenses: Lens[], at: string): EyeFacts {
  const { patient, eye, measurements } = checks;
  const today = localDateOf(new Date(at));
  return {
    patient,
    eye,
    measurements,
    lenses,
    flagsOf: (measurement) => flagsOf(checks, measurement, today),
  };
}
