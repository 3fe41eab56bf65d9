import { AuditEntryModel } from '@/server/db/models/audit-entry';
import type { AuditEntry } from '@/shared/contract';

/** Entries of one action, oldest first. */
export async function auditOf(action: string): Promise<AuditEntry[]> {
  const rows = await AuditEntryModel.findAll({ where: { action }, order: ['id'] });
  return rows.map((row) => row.get());
}
