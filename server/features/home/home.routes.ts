import { hasPermission, homeSchema, paths } from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { HOME_SOURCES } from './home-sources';

export function homeRoutes({ clock }: Pick<Deps, 'clock'>): Route[] {
  return [
    defineRoute({
      method: 'get',
      path: paths.home(),
      access: 'signed-in',
      summary: 'What waits for me',
      reply: homeSchema,
      handle: async ({ actor }) => {
        const sources = HOME_SOURCES.filter(({ permission }) => hasPermission(actor.roles, permission));
        return json({
          sections: await Promise.all(sources.map(({ load }) => load(actor, clock.now().toISOString()))),
        });
      },
    }),
  ];
}
