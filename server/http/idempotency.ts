/**
 * A POST with an Idempotency-Key runs once. Its reply is stored in the transaction of its effect; since all
 * writes wait in one queue, a repetition that arrives meanwhile finds either both or neither.
 */
import { createHash } from 'node:crypto';
import type { Request } from 'express';
import type { Act } from '@/server/act';
import { findStoredReply, forgetRepliesBefore, storeReply } from '@/server/http/idempotency.repository';
import { invalidField, ProblemError } from '@/server/http/problem';
import type { Reply } from '@/server/http/reply';
import type { UploadedFile } from '@/server/http/route';

const KEPT_MS = 24 * 60 * 60 * 1000;
const KEY = /^[\w-]{8,100}$/;

export interface RepeatableRequest {
  key: string;
  bodyHash: string;
}

/** Key of a POST and the digest of what it asks; undefined when it carries no key. */
export function repeatableRequest(
  request: Request,
  upload: UploadedFile | undefined,
): RepeatableRequest | undefined {
  const key = request.get('idempotency-key');
  if (key === undefined || request.method !== 'POST') return undefined;
  if (!KEY.test(key)) throw invalidField('Idempotency-Key', 'Use 8 to 100 letters, digits, - or _');
  const hash = createHash('sha256');
  hash.update(`${request.originalUrl}\n${JSON.stringify(request.body ?? null)}\n`);
  if (upload) hash.update(upload.bytes);
  return { key, bodyHash: hash.digest('hex') };
}

export async function performOnce(
  act: Act,
  { key, bodyHash }: RepeatableRequest,
  perform: () => Promise<Reply>,
): Promise<Reply> {
  await forgetRepliesBefore(act, new Date(Date.parse(act.at) - KEPT_MS).toISOString());
  const earlier = await findStoredReply(act, key);
  if (earlier && earlier.bodyHash !== bodyHash) throw new ProblemError('idempotency-mismatch');
  if (earlier) return earlier.reply;
  const reply = await perform();
  await storeReply(act, key, { bodyHash, reply });
  return reply;
}
