/** `npm run backup`: a checked copy of the database beside it, also while the server runs. */
import { join } from 'node:path';
import { systemClock } from '@/server/clock';
import { readConfig } from '@/server/config';
import { backUp } from '@/server/db/backup';

const COPIES_KEPT = 14;

const { databasePath, dataFolder } = readConfig(process.env);
backUp({ databasePath, folder: join(dataFolder, 'backups'), at: systemClock.now(), keep: COPIES_KEPT }).then(
  (path) => console.log(`Copied and checked: ${path}`),
  (error: unknown) => {
    console.error('No copy was made:', error instanceof Error ? error.message : error);
    process.exit(1);
  },
);
