/** Uploads of biometry files: kept byte for byte, checked, stored after confirmation, or discarded. */
import { hash } from 'node:crypto';
import { z } from 'zod';
import type { BiometryImport, Page } from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import { decodeCursor, toPage } from '@/server/http/paging';
import { ProblemError } from '@/server/http/problem';
import type { UploadedFile } from '@/server/http/route';
import { importDeskOf } from './import-desk';
import { runCheck, runStore } from './import-jobs';
import {
  addImport,
  changeImport,
  findImport,
  findImportBytes,
  findStoredBySha256,
  listImportsAfter,
  type StoredImport,
} from './import.repository';

export { recoverImports, storeFileAtOnce } from './import-jobs';

const FILE_NAME_MAX_LENGTH = 200;

/** Digest of the bytes; to be taken before the act, which must not wait for it. */
export const sha256Of = (bytes: Buffer): string => hash('sha256', bytes, 'hex');

export async function uploadFile(
  deps: Deps,
  act: Act,
  { name, bytes, sha256 }: UploadedFile & { sha256: string },
): Promise<BiometryImport> {
  const id = act.newId();
  const fileName = plainFileName(name);
  const sameFileAs = (await findStoredBySha256(sha256, act.transaction)) ?? null;
  const uploaded = { uploadedBy: act.actor.id, uploadedAt: act.at, sameFileAs };
  await addImport({ id, fileName, bytes, sha256, ...uploaded }, act.transaction);
  const detail = { fileName, sizeBytes: bytes.length, sha256 };
  await recordAudit(act, { action: 'import.upload', noun: 'import', nounId: id, detail });
  act.afterCommit('import.check', () => runCheck(deps, id));
  return withProgress(deps, await getStored(id, act));
}

export async function getImport(deps: Deps, id: string): Promise<BiometryImport> {
  return withProgress(deps, await getStored(id));
}

export async function listImports(
  deps: Deps,
  { limit, after }: { limit?: number; after?: string },
): Promise<Page<BiometryImport>> {
  const from = decodeCursor(after, z.tuple([z.string(), z.string()]));
  return toPage({
    limit,
    fetch: (count) => listImportsAfter(from, count),
    toItem: (stored) => withProgress(deps, stored),
    cursorOf: ({ uploadedAt, id }) => [uploadedAt, id],
  });
}

/** Begins to store. Confirmed twice, or by two people at once, it is stored once. */
export async function confirmImport(deps: Deps, act: Act, id: string): Promise<BiometryImport> {
  const stored = await getStored(id, act);
  if (stored.status === 'ready') {
    const by = { actor: act.actor, requestId: act.requestId };
    const change = { from: 'ready', status: 'storing', storedBy: act.actor.id } as const;
    await changeImport(id, change, act.transaction);
    act.afterCommit('import.store', () => runStore(deps, id, by));
  } else if (stored.status !== 'storing' && stored.status !== 'stored') {
    throw new ProblemError('conflict', UNCONFIRMABLE[stored.status]);
  }
  return withProgress(deps, await getStored(id, act));
}

export async function discardImport(deps: Deps, act: Act, id: string): Promise<BiometryImport> {
  const { status } = await getStored(id, act);
  if (status === 'storing' || status === 'stored') {
    throw new ProblemError('conflict', 'The file is stored already: supersede single measurements instead');
  }
  if (status !== 'discarded') {
    await changeImport(id, { from: status, status: 'discarded' }, act.transaction);
    await recordAudit(act, { action: 'import.discard', noun: 'import', nounId: id });
    importDeskOf(deps).forgetRows(id);
  }
  return withProgress(deps, await getStored(id, act));
}

/** The bytes as they came. */
export async function downloadFile(act: Act, id: string): Promise<UploadedFile> {
  const { fileName } = await getStored(id, act);
  const bytes = await findImportBytes(id, act.transaction);
  if (!bytes) throw new ProblemError('not-found');
  await recordAudit(act, { action: 'import.download', noun: 'import', nounId: id });
  return { name: fileName, bytes };
}

const UNCONFIRMABLE = {
  checking: 'The file is still being checked',
  refused: 'The file as a whole was refused: nothing of it can be stored',
  discarded: 'The file was discarded; upload it again to store it',
} as const;

async function getStored(id: string, act?: Act): Promise<StoredImport> {
  const stored = await findImport(id, act?.transaction);
  if (!stored) throw new ProblemError('not-found');
  return stored;
}

function withProgress(deps: Deps, stored: StoredImport): BiometryImport {
  const { created, alreadyThere, refused } = stored.counts;
  const rows = created + alreadyThere + refused;
  const isRunning = stored.status === 'checking' || stored.status === 'storing';
  const atRest = { done: isRunning ? 0 : rows, total: rows };
  const running = isRunning ? importDeskOf(deps).progressOf(stored.id) : undefined;
  return { ...stored, progress: running ?? atRest };
}

/** The last part of a path, without what could break a header or a list. */
function plainFileName(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? '';
  const plain = last.replace(/[\u0000-\u001f\u007f-\u009f"]/g, '').trim();
  return plain.slice(-FILE_NAME_MAX_LENGTH) || 'upload.csv';
}
