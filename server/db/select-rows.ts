/**
 * Reads in plain SQL, for what every page asks: building models costs several times the read itself. Columns come
 * as the database holds them: JSON as text, booleans as 0 and 1.
 */
import { QueryTypes, type ModelStatic, type Model, type Transaction } from 'sequelize';

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
  const rows = await sequelize.query(sql, { bind: [...bind], transaction, type: QueryTypes.SELECT });
  return rows as Row[];
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
