/**
 * A step of the schema: SQL statements forth and back, run in one transaction. Explicit SQL because
 * Sequelize's `changeColumn` and `removeColumn` rebuild the table on SQLite, dropping constraints and triggers.
 */
export interface Migration {
  name: string;
  up: readonly string[];
  down: readonly string[];
}
