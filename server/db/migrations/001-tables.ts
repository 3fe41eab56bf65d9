/** The first schema. Times are ISO 8601 text in UTC; ids are UUID text; JSON columns hold JSON text. */
import type { Migration } from './migration';
import { ACCOUNT_TABLES } from './001-tables-accounts';
import { CLINICAL_TABLES } from './001-tables-clinical';
import { TRIGGERS } from './001-triggers';

const TABLES_CHILDREN_FIRST = [
  'settings',
  'idempotency_keys',
  'audit_entries',
  'plans',
  'lens_constants',
  'lenses',
  'flag_settlements',
  'measurements',
  'imports',
  'eyes',
  'patients',
  'mails',
  'refresh_sessions',
  'password_links',
  'accounts',
];

export const migration001: Migration = {
  name: '001-tables',
  up: [...ACCOUNT_TABLES, ...CLINICAL_TABLES, ...TRIGGERS.map((trigger) => trigger.sql)],
  // Dropping a table deletes its rows first, which the triggers and the self-references would refuse.
  down: [
    'PRAGMA defer_foreign_keys = ON',
    ...TRIGGERS.map((trigger) => `DROP TRIGGER ${trigger.name}`),
    ...TABLES_CHILDREN_FIRST.map((table) => `DROP TABLE ${table}`),
  ],
};
