/**
 * The connection to SQLite. Sequelize fires no connect hook for SQLite and opens a new connection for every
 * transaction, so the PRAGMAs are set by the driver class itself: each connection gets them.
 */
import { Sequelize, Transaction } from 'sequelize';
import sqlite3 from 'sqlite3';
import { initModels } from '@/server/db/models';
import { createWriteQueue, type WriteQueue } from '@/server/db/write-queue';

const BUSY_TIMEOUT_MS = 5000;

/** `exec` runs alone and before any query that waits for the connection to open. */
const PRAGMAS = 'PRAGMA journal_mode = WAL; PRAGMA synchronous = NORMAL; PRAGMA foreign_keys = ON;';

type Opened = (error: Error | null) => void;

class TunedDatabase extends sqlite3.Database {
  constructor(fileName: string, mode: number, opened: Opened) {
    super(fileName, mode, opened);
    this.configure('busyTimeout', BUSY_TIMEOUT_MS);
    this.exec(PRAGMAS);
  }
}

export interface Database {
  sequelize: Sequelize;
  /** Runs one write transaction at a time; every query inside must carry the transaction. */
  inWrite: WriteQueue['inWrite'];
  /** Runs a write of one statement in the same queue. */
  inTurn: WriteQueue['inTurn'];
  /** Resolves when no write waits or runs. */
  idle: WriteQueue['idle'];
  close(): Promise<void>;
}

/**
 * Opens (or creates) the database file and binds the models to it. One process has one database: the models
 * are classes of the module, and belong to the connection opened last.
 */
export function createDatabase({ storagePath }: { storagePath: string }): Database {
  const sequelize = connect(storagePath);
  initModels(sequelize);
  const queue = createWriteQueue(sequelize);
  return {
    sequelize,
    inWrite: queue.inWrite,
    inTurn: queue.inTurn,
    idle: queue.idle,
    close: async () => {
      await queue.idle();
      await sequelize.query('PRAGMA wal_checkpoint(TRUNCATE)');
      await sequelize.close();
    },
  };
}

function connect(storagePath: string): Sequelize {
  return new Sequelize({
    dialect: 'sqlite',
    storage: storagePath,
    dialectModule: { ...sqlite3, Database: TunedDatabase },
    transactionType: Transaction.TYPES.IMMEDIATE,
    // Statements would carry names and values of patients into the log.
    logging: false,
    define: { underscored: true, timestamps: false },
  });
}
