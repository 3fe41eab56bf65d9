/**
 * The long work of an import, outside the request: the dry run, and the storing. A file is stored in one
 * transaction; whatever stops the work, either all of it is there or nothing.
 */
import { localDateOf, type FieldError, type ImportRow } from '@/shared/contract';
import { inAct, type Act, type ActRequest, type Actor } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import { getPractice } from '@/server/features/practice/practice.service';
import { checkFile, countOutcomes, judgeRows } from './check-file';
import { toImportRow } from './check-rows';
import { importDeskOf } from './import-desk';
import { addImport, changeImport, findImportBytes, listIdsWithStatus } from './import.repository';
import { readRows, type ReadRows } from './read-rows';
import { storeRows } from './store-rows';

const NOBODY = { actor: null, requestId: null };
const FAILED: FieldError = {
  path: 'file',
  code: 'internal',
  message: 'The check failed on our side; nothing was stored. Upload the file again',
};

/** Checks a file and makes the import ready, or refused with the reason. */
export async function runCheck(deps: Deps, importId: string): Promise<void> {
  const desk = importDeskOf(deps);
  try {
    const bytes = await bytesOf(importId);
    const checked = await checkFile(bytes, today(deps), (progress) => desk.noteProgress(importId, progress));
    if ('problems' in checked) return await finishRefused(deps, importId, checked.problems);
    const { readAs, counts, verdicts } = checked;
    desk.keepRows(importId, Promise.resolve(verdicts.map(toImportRow)));
    await inAct(deps, NOBODY, (act) =>
      changeImport(importId, { from: 'checking', status: 'ready', readAs, counts }, act.transaction),
    );
  } catch (error) {
    await finishRefused(deps, importId, [FAILED]);
    throw error;
  } finally {
    desk.forgetProgress(importId);
  }
}

/** Stores what the file adds. On any failure the import is ready again, and nothing of it is stored. */
export async function runStore(deps: Deps, importId: string, by: ActRequest<Actor>): Promise<void> {
  const desk = importDeskOf(deps);
  try {
    const read = await readRows(await bytesOf(importId), today(deps), () => undefined);
    if ('problems' in read) throw new Error('A file that was ready cannot be read any more');
    const { isDemo } = await getPractice();
    const rows = await inAct(deps, by, (act) => storeRead(deps, act, { importId, read, isDemo }));
    desk.keepRows(importId, Promise.resolve(rows));
  } catch (error) {
    await inAct(deps, NOBODY, (act) =>
      changeImport(importId, { from: 'storing', status: 'ready', storedBy: null }, act.transaction),
    );
    throw error;
  } finally {
    desk.forgetProgress(importId);
  }
}

/**
 * At the start of the service: work that an earlier process did not finish. A file that was being stored is
 * ready again (its transaction never happened), one that was being checked is checked anew.
 */
export async function recoverImports(deps: Deps): Promise<void> {
  const unchecked = await inAct(deps, NOBODY, async (act) => {
    for (const id of await listIdsWithStatus('storing', act.transaction)) {
      await changeImport(id, { from: 'storing', status: 'ready', storedBy: null }, act.transaction);
    }
    return listIdsWithStatus('checking', act.transaction);
  });
  for (const id of unchecked) deps.background.run('import.check', () => runCheck(deps, id));
}

/**
 * A file received, checked and stored within one act: for filling a new database, where nobody waits for a
 * dry run. Throws when the file as a whole cannot be read.
 */
export async function storeFileAtOnce(
  deps: Deps,
  act: Act,
  { name, bytes, sha256 }: { name: string; bytes: Buffer; sha256: string },
): Promise<void> {
  const read = await readRows(bytes, today(deps), () => undefined);
  if ('problems' in read) throw new Error(`${name} cannot be read: ${read.problems[0]?.message ?? ''}`);
  const importId = act.newId();
  const uploaded = { uploadedBy: act.actor.id, uploadedAt: act.at, sameFileAs: null };
  await addImport({ id: importId, fileName: name, bytes, sha256, ...uploaded }, act.transaction);
  const storing = { status: 'storing', readAs: read.readAs, storedBy: act.actor.id } as const;
  await changeImport(importId, { from: 'checking', ...storing }, act.transaction);
  await storeRead(deps, act, { importId, read, isDemo: true });
}

interface StoreRequest {
  importId: string;
  read: ReadRows;
  isDemo: boolean;
}

async function storeRead(
  deps: Deps,
  act: Act,
  { importId, read, isDemo }: StoreRequest,
): Promise<ImportRow[]> {
  const desk = importDeskOf(deps);
  const judged = await judgeRows(read, act.transaction);
  const verdicts = await storeRows(act, {
    ...judged,
    importId,
    header: read.header,
    isDemo,
    onProgress: (progress) => desk.noteProgress(importId, progress),
  });
  const counts = countOutcomes(verdicts);
  const change = { from: 'storing', status: 'stored', storedAt: act.at, counts } as const;
  if (!(await changeImport(importId, change, act.transaction))) {
    throw new Error('The import is no longer being stored');
  }
  await recordAudit(act, { action: 'import.store', noun: 'import', nounId: importId, detail: { counts } });
  return verdicts.map(toImportRow);
}

async function finishRefused(deps: Deps, importId: string, problems: FieldError[]): Promise<void> {
  await inAct(deps, NOBODY, (act) =>
    changeImport(importId, { from: 'checking', status: 'refused', problems }, act.transaction),
  );
}

async function bytesOf(importId: string): Promise<Buffer> {
  const bytes = await findImportBytes(importId);
  if (!bytes) throw new Error('The import has no bytes');
  return bytes;
}

const today = (deps: Deps): string => localDateOf(deps.clock.now());
