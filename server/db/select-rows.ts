/**
 * Reads in plain SQL on the driver itself, for what every page asks: building models, and the stack that Sequelize
 * notes down for each query, cost several times the read. Columns come as the database holds them: JSON as text,
 * booleans as 0 and 1.
 */
import type { Model, ModelStatic, Sequelize, Transaction } from 'sequelize';
import type sqlite3 from 'sqlite3';

export interface Selection {
  sql: string;
  /** Values for $1, $2 … */
  bind: readonly (string | number | null)[];
  transaction: Transaction | undefined;
}

/** Rows of a SELECT over the connection that the model is bound to. */
export async function selectRows<Row>(
  { sequelize }: ModelStatic<Model>,
  { sql, bind, transaction }: Selection,
): Promise<Row[]> {
  if (!sequelize) throw new Error('No database is open');
  const connection = await connectionOf(sequelize, transaction);
  const values = Object.fromEntries(bind.map((value, index) => [`$${index + 1}`, value]));
  return new Promise((resolve, reject) => {
    connection.all<Row>(sql, values, (error, rows) => (error ? reject(error) : resolve(rows)));
  });
}

/** That of the transaction, or the one that stays open for reading. */
function connectionOf(sequelize: Sequelize, transaction: Transaction | undefined): Promise<sqlite3.Database> {
  const own = (transaction as { connection?: sqlite3.Database } | undefined)?.connection;
  if (transaction && !own) throw new Error('The transaction has ended');
  if (own) return Promise.resolve(own);
  return sequelize.connectionManager.getConnection({ type: 'read' }) as Promise<sqlite3.Database>;
}

/** `id, patient_id AS patientId`: each attribute under its own name, from its column. */
export function columnList(model: ModelStatic<Model>, attributes: readonly string[], table?: string): string {
  const known = model.getAttributes() as Record<string, { field?: string }>;
  return attributes
    .map((attribute) => {
      const field = known[attribute]?.field;
      if (field === undefined) throw new Error(`${model.name} has no attribute ${attribute}`);
      return `${table ? `${table}.` : ''}"${field}" AS "${attribute}"`;
    })
    .join(', ');
}

/** A condition on any number of values, which travel as one JSON text: `eye_id ${IN_FIRST}`. */
export const IN_FIRST = 'IN (SELECT value FROM json_each($1))';
export const asList = (values: readonly string[]): string => JSON.stringify(values);
