/** Files for people who begin: the empty template, and the demonstration's biometry. */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { TEMPLATE_COLUMNS } from '@/shared/contract';
import { toCsv } from '@/server/reports/csv';

export const templateCsv = (): Buffer => toCsv({ columns: TEMPLATE_COLUMNS, rows: [] });

/** Undefined where the demonstration's file is not part of the installation. */
export function demoCsv(): Buffer | undefined {
  return existsSync(DEMO_FILE) ? readFileSync(DEMO_FILE) : undefined;
}

const DEMO_FILE = join(__dirname, '..', '..', 'db', 'seeds', 'demo-biometry.csv');
