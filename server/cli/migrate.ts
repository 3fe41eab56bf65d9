/** `npm run migrate`: brings the schema up to date without starting the server. */
import { readConfig } from '@/server/config';
import { createDatabase } from '@/server/db/connection';
import { createMigrator } from '@/server/db/migrate';

async function migrate(): Promise<void> {
  const db = createDatabase({ storagePath: readConfig(process.env).databasePath });
  await createMigrator(db.sequelize).up();
  await db.close();
  console.log('The schema is up to date.');
}

migrate().catch((error: unknown) => {
  console.error('The schema was not changed:', error instanceof Error ? error.message : error);
  process.exit(1);
});
