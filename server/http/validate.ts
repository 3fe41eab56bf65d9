/** Checks the parts of a request against the schemas of its route. */
import type { Request } from 'express';
import { ProblemError, problemFromZod } from '@/server/http/problem';
import type { Route } from '@/server/http/route';

export interface ParsedRequest {
  params: unknown;
  query: unknown;
  body: unknown;
}

export function parseRequest(route: Route, request: Request): ParsedRequest {
  return {
    params: parseParams(route, request),
    query: route.query ? orInvalid(route.query.safeParse(request.query)) : undefined,
    body: route.body ? parseBody(route.body, request) : undefined,
  };
}

/** An id that cannot exist is treated like one that does not. */
function parseParams(route: Route, request: Request): unknown {
  const parsed = route.params?.safeParse(request.params);
  if (parsed && !parsed.success) throw new ProblemError('not-found');
  return parsed?.data;
}

function parseBody(schema: NonNullable<Route['body']>, request: Request): unknown {
  const hasBody = request.headers['content-length'] !== '0' && request.headers['content-type'] !== undefined;
  if (hasBody && !request.is(['json', 'multipart/form-data'])) throw new ProblemError('unsupported-type');
  return orInvalid(schema.safeParse(request.body ?? {}));
}

function orInvalid<T>(
  parsed: { success: true; data: T } | { success: false; error: Parameters<typeof problemFromZod>[0] },
): T {
  if (!parsed.success) throw problemFromZod(parsed.error);
  return parsed.data;
}
