/** Outside production a reply that does not fit the contract is an error, so that tests find it. */
import { isDeepStrictEqual } from 'node:util';
import type { Reply } from '@/server/http/reply';
import type { Route } from '@/server/http/route';

/** Throws when the body lacks something that the schema promises, or says more than it names. */
export function checkReply(route: Route, { body }: Reply): void {
  if (typeof route.reply !== 'object') {
    if (body !== undefined) throw new Error(`${route.path} declares no schema for its reply`);
    return;
  }
  const promised = asSent(route.reply.parse(body));
  const sent = asSent(body);
  if (!isDeepStrictEqual(promised, sent))
    throw new Error(`The reply of ${route.path} says more than its schema`);
}

const asSent = (value: unknown): unknown => JSON.parse(JSON.stringify(value)) as unknown;
