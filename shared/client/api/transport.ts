/** One request as it goes over the wire: whose it is, which version it changes, and what it is called. */
import { OFFLINE } from './problem';
import { getSession } from './session-store';

export interface CallOptions {
  method?: 'GET' | 'POST' | 'PUT' | 'DELETE';
  body?: unknown;
  /** Multipart instead of JSON. */
  form?: FormData;
  version?: number;
  idempotencyKey?: string;
  signal?: AbortSignal;
}

/** Sends once and returns the reply whatever its status. No answer at all throws OFFLINE. */
export async function attempt(path: string, options: CallOptions): Promise<Response> {
  try {
    return await fetch(path, {
      method: options.method ?? 'GET',
      headers: headersFor(options),
      body: bodyOf(options),
      signal: options.signal,
      credentials: 'same-origin',
    });
  } catch (error) {
    if (options.signal?.aborted) throw error;
    throw OFFLINE;
  }
}

export function headersFor({ body, version, idempotencyKey }: CallOptions): Record<string, string> {
  const session = getSession();
  return {
    Accept: 'application/json',
    // Asked for by the two calls that ride on the cookie: no foreign page can add it.
    'X-Landfall': '1',
    ...(session.status === 'in' ? { Authorization: `Bearer ${session.accessToken}` } : {}),
    ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
    ...(version === undefined ? {} : { 'If-Match': `"${version}"` }),
    ...(idempotencyKey ? { 'Idempotency-Key': idempotencyKey } : {}),
  };
}

function bodyOf({ form, body }: CallOptions): FormData | string | undefined {
  return form ?? (body === undefined ? undefined : JSON.stringify(body));
}
