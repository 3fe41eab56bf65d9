/** The rows of an import with what becomes, or became, of them. */
import { z } from 'zod';
import { localDateOf, type ImportRow, type Page, type RowOutcome } from '@/shared/contract';
import type { Deps } from '@/server/deps';
import { listKeysOfImport } from '@/server/features/measurements/measurement.service';
import { decodeCursor, toPage } from '@/server/http/paging';
import { ProblemError } from '@/server/http/problem';
import { checkFile } from './check-file';
import { toImportRow } from './check-rows';
import { importDeskOf } from './import-desk';
import { findImport, findImportBytes, type StoredImport } from './import.repository';

export interface RowsRequest {
  importId: string;
  outcome?: RowOutcome;
  limit?: number;
  after?: string;
}

export async function listImportRows(
  deps: Deps,
  { importId, outcome, limit, after }: RowsRequest,
): Promise<Page<ImportRow>> {
  const stored = await findImport(importId);
  if (!stored) throw new ProblemError('not-found');
  const [lastRow] = decodeCursor(after, z.tuple([z.number().int()])) ?? [0];
  const rows = await rowsOf(deps, stored);
  const wanted = outcome === undefined ? rows : rows.filter((row) => row.outcome === outcome);
  const page = await toPage({
    limit,
    fetch: async (count) => wanted.filter(({ row }) => row > lastRow).slice(0, count),
    toItem: (row) => row,
    cursorOf: ({ row }) => [row],
  });
  return { ...page, total: wanted.length };
}

async function rowsOf(deps: Deps, stored: StoredImport): Promise<ImportRow[]> {
  const { id, status } = stored;
  if (status === 'checking' || status === 'refused' || status === 'discarded') return [];
  return importDeskOf(deps).rowsOf(id, () =>
    status === 'stored' ? findStoredRows(deps, id) : findCheckedRows(deps, id),
  );
}

async function findCheckedRows(deps: Deps, importId: string): Promise<ImportRow[]> {
  const bytes = await findImportBytes(importId);
  const checked = bytes && (await checkFile(bytes, localDateOf(deps.clock.now()), () => undefined));
  if (!checked || 'problems' in checked) throw new Error('A file that was ready cannot be read any more');
  return checked.verdicts.map(toImportRow);
}

/** After storing, the measurements themselves say which rows were created; the check says why others were not. */
async function findStoredRows(deps: Deps, importId: string): Promise<ImportRow[]> {
  const keys = await listKeysOfImport(importId);
  const byRow = new Map(keys.map((key) => [key.importRow, key]));
  const rows = await findCheckedRows(deps, importId);
  return rows.map((row) => {
    const key = byRow.get(row.row);
    if (key) {
      const { patientId, id: measurementId } = key;
      const summary = `stored, ${key.side} eye`;
      return { ...row, outcome: 'created', summary, problems: [], patientId, measurementId };
    }
    return row.outcome === 'created' ? { ...row, outcome: 'refused', summary: REFUSED_THEN } : row;
  });
}

const REFUSED_THEN = 'not stored: refused when the file was stored, and would be accepted now';
