/**
 * All writes of the process, one after the other. SQLite has one writer at a time; waiting inside the driver
 * blocks its few threads, so that even the writer that holds the lock cannot commit. Waiting here costs nothing.
 */
import type { Sequelize, Transaction } from 'sequelize';

/** For services, which know no Sequelize but hand the transaction on. */
export type { Transaction };

export interface WriteQueue {
  inWrite<T>(write: (transaction: Transaction) => Promise<T>): Promise<T>;
  /** A write of one statement is a transaction by itself: it waits its turn and needs no connection of its own. */
  inTurn<T>(writeOnce: () => Promise<T>): Promise<T>;
  idle(): Promise<void>;
}

export function createWriteQueue(sequelize: Sequelize): WriteQueue {
  let last: Promise<unknown> = Promise.resolve();
  const inTurn = <T>(writeOnce: () => Promise<T>): Promise<T> => {
    const result = last.then(writeOnce);
    last = result.catch(() => undefined);
    return result;
  };
  return {
    inTurn,
    inWrite: (write) => inTurn(() => sequelize.transaction(write)),
    async idle() {
      let seen: unknown;
      while (seen !== last) {
        seen = last;
        await last;
      }
    },
  };
}
