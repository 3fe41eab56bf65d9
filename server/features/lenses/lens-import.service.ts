/** A catalogue file: read, judged, and stored as a whole or not at all. */
import { LENS_COLUMNS, type FieldError, type LensImportResult, type LensRowOutcome } from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import { decodeText } from '@/server/csv/decode';
import { fileError, readHeader } from '@/server/csv/header';
import { BrokenQuoteError, recordBatches } from '@/server/csv/records';
import type { Transaction } from '@/server/db/write-queue';
import { ProblemError } from '@/server/http/problem';
import { toCsv } from '@/server/reports/csv';
import { judgeLensRows, toResultRows, type ModelVerdict } from './check-lens-rows';
import { createLens, listLenses, updateLens } from './lens.service';
import { readLensRow, type LensRow } from './read-lens-row';

export type ReadLenses = { rows: LensRow[] } | { problems: FieldError[] };

export const lensTemplateCsv = (): Buffer => toCsv({ columns: LENS_COLUMNS, rows: [] });

/** Pure; to be done before the act. */
export function readLensFile(bytes: Buffer): ReadLenses {
  const decoded = decodeText(bytes);
  if ('problem' in decoded) return { problems: [fileError(decoded.problem.code, decoded.problem.message)] };
  const header = readHeader(decoded.text, LENS_COLUMNS);
  if ('problems' in header) return header;
  try {
    const records = [...recordBatches(decoded.text, header.delimiter)].flat();
    const rows = records
      .filter(({ line }) => line > header.line)
      .map((record) => readLensRow(header, record));
    if (rows.length > 0) return { rows };
    return { problems: [fileError('no-rows', 'The file has a header and no rows below it')] };
  } catch (error) {
    if (!(error instanceof BrokenQuoteError)) throw error;
    const message = `A quoted field that begins in line ${error.line} does not end properly`;
    return { problems: [fileError('broken-quote', message)] };
  }
}

/** What storing the file would do. */
export async function checkLenses(read: ReadLenses): Promise<LensImportResult> {
  if ('problems' in read) return { isStored: false, rows: [], counts: countOf([]), problems: read.problems };
  return toResult(await judge(read.rows), false);
}

export async function storeLenses(
  act: Act,
  read: ReadLenses,
  { isDemo }: { isDemo: boolean },
): Promise<LensImportResult> {
  if ('problems' in read) throw new ProblemError('invalid', undefined, { fields: read.problems });
  const verdicts = await judge(read.rows, act.transaction);
  if (verdicts.some(({ outcome }) => outcome === 'refused')) throw refusal(verdicts);
  for (const { outcome, input, stored } of verdicts) {
    if (!input) continue;
    if (!stored) await createLens(act, input, { isDemo });
    else if (outcome === 'changed') await updateLens(act, stored, input);
  }
  const result = toResult(verdicts, true);
  await recordAudit(act, { action: 'lens.import', noun: 'lens', detail: { counts: result.counts } });
  return result;
}

async function judge(rows: readonly LensRow[], transaction?: Transaction): Promise<ModelVerdict[]> {
  return judgeLensRows(rows, await listLenses(transaction));
}

function refusal(verdicts: readonly ModelVerdict[]): ProblemError {
  const fields = toResultRows(verdicts).flatMap(({ row, problems }) =>
    problems.map(({ column, message }) => ({ path: `rows.${row}.${column}`, code: 'custom', message })),
  );
  return new ProblemError('invalid', 'Nothing was stored: some lines are refused', { fields });
}

function toResult(verdicts: readonly ModelVerdict[], isStored: boolean): LensImportResult {
  const rows = toResultRows(verdicts);
  return { isStored, rows, counts: countOf(rows), problems: [] };
}

function countOf(rows: LensImportResult['rows']): LensImportResult['counts'] {
  const countRows = (outcome: LensRowOutcome): number => rows.filter((row) => row.outcome === outcome).length;
  return {
    created: countRows('created'),
    changed: countRows('changed'),
    alreadyThere: countRows('already-there'),
    refused: countRows('refused'),
  };
}
