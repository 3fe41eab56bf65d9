/**
 * Many rows into one table, a thousand at a time: the rows travel as one JSON text and SQLite takes them
 * apart, which is several times faster than a statement per row.
 *
 * SQLite reads some decimal numbers in text into the neighbouring floating-point number (7.548646835 becomes
 * 7.5486468349999996). Decimals therefore travel as whole numbers of billionths and are divided there: a
 * division rounds correctly, so that exactly the number that went in is stored.
 */
import { DataTypes, type Model, type ModelStatic, type Transaction } from 'sequelize';

/** An object or array becomes its JSON text. Booleans go in as 0 and 1. */
export type RowValue = string | number | null | object;

export interface RowsToInsert {
  /** Names of the model's attributes, in the order of each row's values. */
  attributes: readonly string[];
  rows: readonly (readonly RowValue[])[];
  transaction: Transaction;
}

interface Column {
  name: string;
  isDecimal: boolean;
}

const ROWS_PER_STATEMENT = 1000;
const BILLION = 1e9;

export async function insertRows<M extends Model>(
  model: ModelStatic<M>,
  { attributes, rows, transaction }: RowsToInsert,
): Promise<void> {
  const columns = attributes.map((attribute) => columnOf(model, attribute));
  const sql = insertStatement(model.tableName, columns);
  for (let from = 0; from < rows.length; from += ROWS_PER_STATEMENT) {
    const part = rows.slice(from, from + ROWS_PER_STATEMENT).map((row) => encode(row, columns));
    await model.sequelize?.query(sql, { bind: [JSON.stringify(part)], transaction });
  }
}

function columnOf<M extends Model>(model: ModelStatic<M>, attribute: string): Column {
  const known = model.getAttributes() as Record<string, { field?: string; type: unknown }>;
  const { field, type } = known[attribute] ?? {};
  if (field === undefined) throw new Error(`${model.name} has no attribute ${attribute}`);
  return { name: field, isDecimal: type instanceof DataTypes.DOUBLE };
}

function insertStatement(table: string, columns: readonly Column[]): string {
  const names = columns.map(({ name }) => `"${name}"`);
  const values = columns.map(({ isDecimal }, index) =>
    isDecimal ? `(value ->> ${index}) / 1000000000.0` : `value ->> ${index}`,
  );
  return `INSERT INTO ${table} (${names.join(', ')}) SELECT ${values.join(', ')} FROM jsonb_each($1)`;
}

function encode(row: readonly RowValue[], columns: readonly Column[]): RowValue[] {
  return row.map((value, index) => {
    if (typeof value === 'number') return columns[index]?.isDecimal ? billionths(value) : value;
    // As text: SQLite need not take it apart to put it in.
    return typeof value === 'object' && value !== null ? JSON.stringify(value) : value;
  });
}

function billionths(value: number): number {
  const whole = Math.round(value * BILLION);
  if (!Number.isSafeInteger(whole) || whole / BILLION !== value) {
    throw new Error(`${value} has more than nine decimals`);
  }
  return whole;
}
