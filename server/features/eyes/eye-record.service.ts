/** The two eyes that every patient has, and what is known of their history. */
import { SIDES, type Eye, type EyeHistory, type Side } from '@/shared/contract';
import type { Act, AnyAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Transaction } from '@/server/db/write-queue';
import { requireVersion } from '@/server/http/etag';
import { ProblemError } from '@/server/http/problem';
import {
  addEyes,
  changeHistory,
  findEyeById,
  findEyes,
  findPairOf,
  listEyeKeys,
  listEyesOfPatients,
  listPairsOf,
  type EyeKey,
} from './eye-record.repository';

export type { EyeKey };
export { findEyeById, findPairOf, listEyeKeys, listEyesOfPatients, listPairsOf };

/** A right and a left eye for each of the new patients. */
export async function createEyes(act: AnyAct, patientIds: readonly string[]): Promise<EyeKey[]> {
  const eyes = patientIds.flatMap((patientId) => SIDES.map((side) => ({ id: act.newId(), patientId, side })));
  await addEyes(eyes, act.at, act.transaction);
  return eyes;
}

/** The eye asked for and its fellow. */
export async function getEyes(
  patientId: string,
  side: Side,
  transaction?: Transaction,
): Promise<{ eye: Eye; fellowEye: Eye }> {
  const eyes = await findEyes(patientId, transaction);
  const eye = eyes.find((candidate) => candidate.side === side);
  const fellowEye = eyes.find((candidate) => candidate.side !== side);
  if (!eye || !fellowEye) throw new ProblemError('not-found');
  return { eye, fellowEye };
}

export interface HistoryChange {
  patientId: string;
  side: Side;
  ifMatch: number;
  history: EyeHistory;
}

export async function recordHistory(
  act: Act,
  { patientId, side, ifMatch, history }: HistoryChange,
): Promise<Eye> {
  const { eye } = await getEyes(patientId, side, act.transaction);
  requireVersion(ifMatch, eye.version, eye);
  if (isSameHistory(eye.history, history)) return eye;
  const changed = await changeHistory(eye.id, { ...history, at: act.at }, act.transaction);
  await recordAudit(act, {
    action: 'eye.change-history',
    noun: 'eye',
    nounId: eye.id,
    patientId,
    version: changed.version,
    detail: { side, before: eye.history, after: changed.history },
  });
  return changed;
}

function isSameHistory(a: EyeHistory, b: EyeHistory): boolean {
  return (
    a.cornealSurgery === b.cornealSurgery &&
    a.cornealSurgeryKind === b.cornealSurgeryKind &&
    a.lensStatus === b.lensStatus &&
    a.vitreousStatus === b.vitreousStatus &&
    a.remarks === b.remarks
  );
}
