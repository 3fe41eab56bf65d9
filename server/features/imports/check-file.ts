/** The dry run of a file: what storing it would do, row by row. Changes nothing. */
import type { BiometryImport, FieldError, RowOutcome } from '@/shared/contract';
import type { Transaction } from '@/server/db/write-queue';
import { breathe } from './breathe';
import { createJudge, type RowVerdict } from './check-rows';
import { readRows, type OnProgress, type ReadRows } from './read-rows';
import { loadStoredRecords, type LoadedRecords } from './stored-records';

export type Counts = BiometryImport['counts'];
export const NO_COUNTS: Counts = { created: 0, alreadyThere: 0, refused: 0, newPatients: 0 };

export interface CheckedFile {
  readAs: string;
  verdicts: RowVerdict[];
  counts: Counts;
}

export interface JudgedRows {
  verdicts: RowVerdict[];
  stored: LoadedRecords;
}

export async function checkFile(
  bytes: Buffer,
  today: string,
  onProgress: OnProgress,
): Promise<CheckedFile | { problems: FieldError[] }> {
  const read = await readRows(bytes, today, onProgress);
  if ('problems' in read) return read;
  const { verdicts } = await judgeRows(read);
  return { readAs: read.readAs, verdicts, counts: countOutcomes(verdicts) };
}

/** Judges what was read against the database, inside the transaction where one is given. */
export async function judgeRows({ readings }: ReadRows, transaction?: Transaction): Promise<JudgedRows> {
  const stored = await loadStoredRecords(readings, transaction);
  const judge = createJudge(readings, stored);
  const verdicts: RowVerdict[] = [];
  for (const reading of readings) {
    verdicts.push(judge.judge(reading));
    if (verdicts.length % ROWS_PER_TURN === 0) await breathe();
  }
  return { verdicts, stored };
}

export function countOutcomes(verdicts: readonly RowVerdict[]): Counts {
  const counts = { ...NO_COUNTS };
  for (const { outcome, isNewPatient } of verdicts) {
    counts[COUNT_NAMES[outcome]] += 1;
    if (isNewPatient) counts.newPatients += 1;
  }
  return counts;
}

const ROWS_PER_TURN = 2000;
const COUNT_NAMES = {
  created: 'created',
  'already-there': 'alreadyThere',
  refused: 'refused',
} as const satisfies Record<RowOutcome, keyof Counts>;
