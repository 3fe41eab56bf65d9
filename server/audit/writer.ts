/** Adds to the audit trail, in the transaction of the act itself: both happen or neither. */
import type { AnyAct } from '@/server/act';
import { AuditEntryModel } from '@/server/db/models/audit-entry';

export interface AuditNote {
  /** What happened: noun, dot, verb; `patient.create`, `plan.sign`, `session.refused`. */
  action: string;
  noun: string;
  nounId?: string;
  patientId?: string;
  version?: number;
  /** Old and new values of a change, the reason of an override. Never passwords or tokens. */
  detail?: Record<string, unknown>;
}

export async function recordAudit(act: AnyAct, note: AuditNote): Promise<void> {
  await AuditEntryModel.create(
    {
      at: act.at,
      actorId: act.actor?.id ?? null,
      actorName: act.actor?.displayName ?? 'nobody signed in',
      action: note.action,
      noun: note.noun,
      nounId: note.nounId ?? null,
      patientId: note.patientId ?? null,
      version: note.version ?? null,
      requestId: act.requestId,
      detail: note.detail ?? {},
    },
    { transaction: act.transaction },
  );
}
