/**
 * Notes that somebody looked at a record. Reading needs no transaction, and its entry is one statement: the view is
 * answered when the entry is stored, and not at all when it cannot be.
 */
import type { Actor } from '@/server/act';
import type { AuditNote } from '@/server/audit/writer';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import type { Deps } from '@/server/deps';

export type ViewDeps = Pick<Deps, 'db' | 'clock'>;

export interface Viewer {
  actor: Actor;
  requestId: string;
}

const SQL = `INSERT INTO audit_entries
  (at, actor_id, actor_name, action, noun, noun_id, patient_id, version, request_id, detail)
  VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)`;

export async function recordView(
  { db, clock }: ViewDeps,
  { actor, requestId }: Viewer,
  { action, noun, nounId, patientId, version, detail }: AuditNote,
): Promise<void> {
  const about = [noun, nounId ?? null, patientId ?? null, version ?? null];
  const bind = [
    clock.now().toISOString(),
    actor.id,
    actor.displayName,
    action,
    ...about,
    requestId,
    JSON.stringify(detail ?? {}),
  ];
  await db.inTurn(async () => AuditEntryModel.sequelize?.query(SQL, { bind }));
}
