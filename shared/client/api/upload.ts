/** A file on its way to the server, with the share that has arrived: fetch cannot tell, so XMLHttpRequest does. */
import type { z } from 'zod';
import { checked } from './client';
import { OFFLINE, problemIn } from './problem';
import { refreshSession } from './refresh';
import { headersFor } from './transport';

export interface UploadOptions {
  file: File;
  /** Called with 0..1 as bytes leave; 1 means sent, not yet read. */
  onProgress?: (share: number) => void;
  idempotencyKey?: string;
  signal?: AbortSignal;
}

interface UploadReply {
  status: number;
  body: unknown;
  requestId: string | null;
}

/** Sends `file` as multipart; throws ApiProblem as `call` does. */
export async function upload<T extends z.ZodType>(
  path: string,
  schema: T,
  options: UploadOptions,
): Promise<z.output<T>> {
  let reply = await post(path, options);
  if (reply.status === 401 && (await refreshSession())) reply = await post(path, options);
  if (reply.status < 200 || reply.status > 299) throw problemIn(reply.status, reply.body);
  return checked(reply.body, schema, reply.requestId);
}

function post(
  path: string,
  { file, onProgress, idempotencyKey, signal }: UploadOptions,
): Promise<UploadReply> {
  return new Promise((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', path);
    for (const [name, value] of Object.entries(headersFor({ idempotencyKey })))
      request.setRequestHeader(name, value);
    request.upload.onprogress = ({ loaded, total }) => onProgress?.(total > 0 ? loaded / total : 0);
    request.onerror = () => reject(OFFLINE);
    request.onabort = () => reject(new DOMException('The upload was given up', 'AbortError'));
    request.onload = () =>
      resolve({
        status: request.status,
        body: jsonOf(request.responseText),
        requestId: request.getResponseHeader('X-Request-Id'),
      });
    signal?.addEventListener('abort', () => request.abort(), { once: true });
    const form = new FormData();
    form.append('file', file);
    request.send(form);
  });
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
