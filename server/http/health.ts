/** `/livez`: the process answers. `/readyz`: it can also read, write, and has the schema it expects. */
import { Router, type Response } from 'express';
import type { Database } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';
import { canWrite } from '@/server/db/write-test';

export function healthRoutes(db: Database): Router {
  const migrator = createMigrator(db.sequelize);
  const checks = {
    schema: async () => !(await migrator.hasPending()),
    write: () => canWrite(db),
  };

  const router = Router();
  router.get('/livez', (_request, response) => answer(response, { process: true }));
  router.get('/readyz', async (_request, response) => {
    const results = await Promise.all(
      Object.entries(checks).map(async ([name, check]) => [name, await check().catch(() => false)] as const),
    );
    answer(response, Object.fromEntries(results));
  });
  return router;
}

function answer(response: Response, checks: Record<string, boolean>): void {
  const isGood = Object.values(checks).every(Boolean);
  response
    .status(isGood ? 200 : 503)
    .setHeader('Cache-Control', 'no-store')
    .json({ status: isGood ? 'ok' : 'failing', checks });
}
