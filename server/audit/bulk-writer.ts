/** Adds many entries to the audit trail at once, for acts that create thousands of records. */
import type { AnyAct } from '@/server/act';
import type { AuditNote } from '@/server/audit/writer';
import { insertRows } from '@/server/db/insert-rows';
import { AuditEntryModel } from '@/server/db/models/audit-entry';

const ATTRIBUTES = [
  'at',
  'actorId',
  'actorName',
  'action',
  'noun',
  'nounId',
  'patientId',
  'version',
  'requestId',
  'detail',
] as const;

export async function recordAudits(act: AnyAct, notes: readonly AuditNote[]): Promise<void> {
  const rows = notes.map((note) => [
    act.at,
    act.actor?.id ?? null,
    act.actor?.displayName ?? 'nobody signed in',
    note.action,
    note.noun,
    note.nounId ?? null,
    note.patientId ?? null,
    note.version ?? null,
    act.requestId,
    note.detail ?? {},
  ]);
  await insertRows(AuditEntryModel, { attributes: ATTRIBUTES, rows, transaction: act.transaction });
}
