import { outboxPageSchema, pageQuerySchema, paths } from '@/shared/contract';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { listMails } from './outbox.service';

export function outboxRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.outbox(),
      access: 'account.manage',
      summary: 'Mails kept by the local stand-in of a mail service, newest first',
      query: pageQuerySchema,
      reply: outboxPageSchema,
      handle: async ({ query }) => json(await listMails(query.limit, query.after)),
    }),
  ];
}
