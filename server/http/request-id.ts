/** Gives each request an id of our own making; it stands in the reply, the log, problems and audit entries. */
import type { RequestHandler, Response } from 'express';
import type { Random } from '@/server/clock';

export function requestId(random: Random): RequestHandler {
  return (_request, response, next) => {
    const id = random.uuid();
    response.locals.requestId = id;
    response.setHeader('X-Request-Id', id);
    next();
  };
}

export function requestIdOf(response: Response): string {
  return String(response.locals.requestId);
}
