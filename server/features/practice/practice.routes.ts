import { accountSchema, firstAdministratorSchema, paths, practiceSchema } from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { created, json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { makeFirstAdministrator } from './first-administrator.service';
import { describePractice } from './practice.service';

export function practiceRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.practice(),
      access: 'public',
      summary: 'Name of the practice, and whether its data are invented',
      reply: practiceSchema,
      handle: async () => json(await describePractice()),
    }),
    defineRoute({
      method: 'post',
      path: paths.setup(),
      access: 'public',
      summary: 'Make the first administrator, with the code from the console',
      body: firstAdministratorSchema,
      reply: accountSchema,
      handle: async ({ body, clientIp, requestId }) => {
        const account = await makeFirstAdministrator(deps, { wanted: body, clientIp, requestId });
        return created(account, { location: paths.account(account.id), version: account.version });
      },
    }),
  ];
}
