/** Files for people who begin: the empty template, and the demonstration's biometry. */
import { TEMPLATE_COLUMNS } from '@/shared/contract';
import { toCsv } from '@/server/reports/csv';

export const templateCsv = (): Buffer => toCsv({ columns: TEMPLATE_COLUMNS, rows: [] });
