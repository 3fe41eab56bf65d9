/** Brings the schema up (and back down in tests), each migration in its own transaction. */
import type { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { MIGRATIONS } from '@/server/db/migrations';

export interface Migrator {
  up(): Promise<void>;
  /** Undoes every migration. */
  down(): Promise<void>;
  hasPending(): Promise<boolean>;
}

export function createMigrator(sequelize: Sequelize): Migrator {
  const umzug = new Umzug({
    migrations: MIGRATIONS.map(({ name, up, down }) => ({
      name,
      up: () => runAll(sequelize, up),
      down: () => runAll(sequelize, down),
    })),
    storage: new SequelizeStorage({ sequelize, modelName: 'migration', tableName: 'schema_migrations' }),
    logger: undefined,
  });
  return {
    up: async () => void (await umzug.up()),
    down: async () => void (await umzug.down({ to: 0 })),
    hasPending: async () => (await umzug.pending()).length > 0,
  };
}

async function runAll(sequelize: Sequelize, statements: readonly string[]): Promise<void> {
  await sequelize.transaction(async (transaction) => {
    for (const statement of statements) await sequelize.query(statement, { transaction });
  });
}
