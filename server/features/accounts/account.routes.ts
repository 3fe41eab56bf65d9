import {
  accountChangeSchema,
  accountPageSchema,
  accountSchema,
  idSchema,
  invitationSchema,
  pageQuerySchema,
  paths,
} from '@/shared/contract';
import { z } from 'zod';
import type { Deps } from '@/server/deps';
import { created, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import {
  changeAccountByRequest,
  inviteAccount,
  inviteAgain,
  listAccounts,
} from './account-management.service';

const params = z.object({ id: idSchema });

export function accountRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.accounts(),
      access: 'account.manage',
      summary: 'Accounts by name',
      query: pageQuerySchema,
      reply: accountPageSchema,
      handle: async ({ query }) => json(await listAccounts(query.limit, query.after)),
    }),
    defineRoute({
      method: 'post',
      path: paths.accounts(),
      access: 'account.manage',
      summary: 'Invite somebody by mail',
      body: invitationSchema,
      reply: accountSchema,
      handle: ({ body, write }) =>
        write(async (act) => {
          const account = await inviteAccount(deps, act, body);
          return created(account, { location: paths.account(account.id), version: account.version });
        }),
    }),
    defineRoute({
      method: 'put',
      path: paths.account(':id'),
      access: 'account.manage',
      summary: 'Change name, roles or status; ends the sign-ins when roles change or the account is disabled',
      params,
      body: accountChangeSchema,
      reply: accountSchema,
      handle: ({ params: { id }, body, ifMatch, write }) =>
        write(async (act) => {
          const account = await changeAccountByRequest(act, { id, ifMatch, change: body });
          return json(account, { version: account.version });
        }),
    }),
    defineRoute({
      method: 'post',
      path: paths.accountInvitation(':id'),
      access: 'account.manage',
      summary: 'Send the invitation again; the earlier link no longer works',
      params,
      reply: accountSchema,
      handle: ({ params: { id }, write }) =>
        write(async (act) => {
          const account = await inviteAgain(deps, act, id);
          return json(account, { version: account.version });
        }),
    }),
  ];
}
