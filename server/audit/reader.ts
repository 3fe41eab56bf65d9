/** Reads the audit trail, newest first. */
import { Op, type WhereOptions } from 'sequelize';
import { z } from 'zod';
import type { AuditEntry, AuditQuery, Page } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { decodeCursor, toPage } from '@/server/http/paging';

export async function listAuditEntries(query: AuditQuery): Promise<Page<AuditEntry>> {
  const [beforeId] = decodeCursor(query.after, z.tuple([z.number().int()])) ?? [];
  const where: WhereOptions = {
    ...optional('noun', query.noun),
    ...optional('nounId', query.nounId),
    ...optional('patientId', query.patientId),
    ...optional('actorId', query.actorId),
    ...(beforeId === undefined ? {} : { id: { [Op.lt]: beforeId } }),
  };
  return toPage({
    limit: query.limit,
    fetch: (count) => AuditEntryModel.findAll({ where, order: [['id', 'DESC']], limit: count }),
    toItem: (row): AuditEntry => row.get(),
    cursorOf: ({ id }) => [id],
  });
}

const optional = (name: string, value: string | undefined): Record<string, string> =>
  value === undefined ? {} : { [name]: value };
