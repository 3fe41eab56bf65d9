import { paths, practiceSchema } from '@/shared/contract';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { describePractice } from './practice.service';

export function practiceRoutes(): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.practice(),
      access: 'public',
      summary: 'Name of the practice, and whether its data are invented',
      reply: practiceSchema,
      handle: async () => json(await describePractice()),
    }),
  ];
}
