/**
 * Calls to the API: bearer token from memory, one refresh for all callers that meet an expired token,
 * versions as If-Match, a key for each POST so that a repeated click is not a second act.
 */
import { paths, sessionSchema } from '@/shared/contract';
import type { z } from 'zod';
import { OFFLINE, problemOf } from './problem';
import { getSession, sessionEnded, sessionStarted } from './session-store';

export interface CallOptions {
  method?: 'GET' | 'POST' | 'PUT' | 'DELETE';
  body?: unknown;
  /** Multipart instead of JSON. */
  form?: FormData;
  version?: number;
  idempotencyKey?: string;
  signal?: AbortSignal;
}

/** The client's mark, asked for by the two calls that ride on the cookie. */
const OWN_HEADER = { 'X-Landfall': '1' };

/** Calls, checks the reply against its schema, and returns it. Throws ApiProblem. */
export async function call<T extends z.ZodType>(
  path: string,
  schema: T,
  options: CallOptions = {},
): Promise<z.output<T>> {
  const response = await send(path, options);
  return schema.parse(await response.json()) as z.output<T>;
}

/** Calls where only success matters. */
export async function callEmpty(path: string, options: CallOptions = {}): Promise<void> {
  await send(path, options);
}

/** Fetches a file with the bearer token. */
export async function callFile(path: string): Promise<{ blob: Blob; fileName: string }> {
  const response = await send(path, {});
  const named = /filename\*?=(?:UTF-8'')?"?([^";]+)"?/i.exec(
    response.headers.get('Content-Disposition') ?? '',
  );
  return { blob: await response.blob(), fileName: decodeURIComponent(named?.[1] ?? 'download') };
}

async function send(path: string, options: CallOptions): Promise<Response> {
  const first = await attempt(path, options);
  if (first.status !== 401 || path.startsWith('/api/auth/')) return accepted(first);
  const isRefreshed = await refreshSession();
  if (!isRefreshed) throw await problemOf(first);
  return accepted(await attempt(path, options));
}

async function accepted(response: Response): Promise<Response> {
  if (response.ok) return response;
  throw await problemOf(response);
}

async function attempt(path: string, options: CallOptions): Promise<Response> {
  const session = getSession();
  const headers: Record<string, string> = { Accept: 'application/json', ...OWN_HEADER };
  if (session.status === 'in') headers.Authorization = `Bearer ${session.accessToken}`;
  if (options.body !== undefined) headers['Content-Type'] = 'application/json';
  if (options.version !== undefined) headers['If-Match'] = `"${options.version}"`;
  if (options.idempotencyKey) headers['Idempotency-Key'] = options.idempotencyKey;
  try {
    return await fetch(path, {
      method: options.method ?? 'GET',
      headers,
      body: options.form ?? (options.body === undefined ? undefined : JSON.stringify(options.body)),
      signal: options.signal,
      credentials: 'same-origin',
    });
  } catch (error) {
    if (options.signal?.aborted) throw error;
    throw OFFLINE;
  }
}

let refreshing: Promise<boolean> | undefined;

/** Renews the session from the cookie; concurrent callers share one attempt. False: signed out. */
export function refreshSession(): Promise<boolean> {
  refreshing ??= withTabLock(refreshOnce).finally(() => {
    refreshing = undefined;
  });
  return refreshing;
}

async function refreshOnce(): Promise<boolean> {
  const response = await attempt(paths.refresh(), { method: 'POST' });
  if (response.ok) {
    sessionStarted(sessionSchema.parse(await response.json()));
    return true;
  }
  // Only a plain refusal ends the session: a busy or broken server does not sign anybody out.
  if (response.status !== 401) throw await problemOf(response);
  sessionEnded(getSession().status === 'in');
  return false;
}

/** Tabs share one cookie: with Web Locks they take turns instead of racing for the rotation. */
function withTabLock(work: () => Promise<boolean>): Promise<boolean> {
  const locks = globalThis.navigator?.locks;
  return locks ? locks.request('landfall.refresh', work) : work();
}
