/**
 * Calls to the API: bearer token from memory, one refresh for all callers that meet an expired token,
 * versions as If-Match, a key for each POST so that a repeated click is not a second act.
 */
import type { z } from 'zod';
import { problemOf, unreadable } from './problem';
import { refreshSession } from './refresh';
import { attempt } from './transport';
import type { CallOptions } from './transport';

/** Calls, checks the reply against its schema, and returns it. Throws ApiProblem. */
export async function call<T extends z.ZodType>(
  path: string,
  schema: T,
  options: CallOptions = {},
): Promise<z.output<T>> {
  const response = await send(path, options);
  const body: unknown = await response.json().catch(() => undefined);
  return checked(body, schema, response.headers.get('X-Request-Id'));
}

/** Calls where only success matters. */
export async function callEmpty(path: string, options: CallOptions = {}): Promise<void> {
  await send(path, options);
}

/** Fetches a file with the bearer token. */
export async function callFile(path: string): Promise<{ blob: Blob; fileName: string }> {
  const response = await send(path, {});
  const fileName = fileNameIn(response.headers.get('Content-Disposition') ?? '');
  return { blob: await response.blob(), fileName };
}

/** A number that was read wrongly is worse than none: a reply of another shape is refused, not used in part. */
export function checked<T extends z.ZodType>(
  body: unknown,
  schema: T,
  requestId: string | null,
): z.output<T> {
  const parsed = schema.safeParse(body);
  if (parsed.success) return parsed.data;
  throw unreadable({ status: 200, requestId: requestId ?? undefined });
}

/** A refused token is renewed once and the call repeated; the sign-in paths speak for themselves. */
export async function send(path: string, options: CallOptions): Promise<Response> {
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

function fileNameIn(disposition: string): string {
  const encoded = /filename\*=UTF-8''([^;]+)/i.exec(disposition)?.[1];
  const plain = /filename="?([^";]+)"?/i.exec(disposition)?.[1];
  try {
    return decodeURIComponent(encoded ?? plain ?? 'download');
  } catch {
    return plain ?? 'download';
  }
}
