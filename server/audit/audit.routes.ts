import { auditPageSchema, auditQuerySchema, paths } from '@/shared/contract';
import { listAuditEntries } from '@/server/audit/reader';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';

export function auditRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.audit(),
      access: 'audit.read',
      summary: 'The audit trail, newest first',
      query: auditQuerySchema,
      reply: auditPageSchema,
      handle: async ({ query }) => json(await listAuditEntries(query)),
    }),
  ];
}
