/** Every error of every request ends here, as a problem document. */
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import type { ProblemCode } from '@/shared/contract';
import { requestIdOf } from '@/server/http/request-id';
import { ProblemError } from '@/server/http/problem';

export const unknownPath: RequestHandler = () => {
  throw new ProblemError('not-found');
};

export function errorHandler(logger: Logger): ErrorRequestHandler {
  // Express knows an error handler by its four parameters.
  // eslint-disable-next-line max-params
  return (error: unknown, _request, response, next) => {
    // Too late for another answer: Express then closes the connection.
    if (response.headersSent) return next(error);
    const problem = asProblem(error);
    if (problem.code === 'internal') logger.error({ requestId: requestIdOf(response), err: error }, 'failed');
    sendProblem(response, problem);
  };
}

export function sendProblem(response: Response, problem: ProblemError): void {
  const document = problem.toProblem(requestIdOf(response));
  const { retryAfterS } = problem.extras;
  if (retryAfterS !== undefined) response.setHeader('Retry-After', String(retryAfterS));
  if (document.status === 401) response.setHeader('WWW-Authenticate', 'Bearer');
  response.status(document.status).type('application/problem+json').send(JSON.stringify(document));
}

function asProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  const { name, status } = describe(error);
  if (isTaken(error)) return new ProblemError('conflict');
  if (name === 'SequelizeOptimisticLockError') return new ProblemError('changed-meanwhile');
  return new ProblemError((status === undefined ? undefined : CLIENT_ERRORS[status]) ?? 'internal');
}

/**
 * Last line of defence; services look first and say what is taken. Sequelize calls every refusal of SQLite a unique
 * constraint, also that of a trigger or a check, which would be our own mistake: only the driver's text tells.
 */
function isTaken(error: unknown): boolean {
  const parent = error instanceof Error && 'parent' in error ? error.parent : undefined;
  return parent instanceof Error && parent.message.includes('UNIQUE constraint failed');
}

/** Errors of Express and its body parsers, by the status that they carry. */
const CLIENT_ERRORS: Record<number, ProblemCode> = {
  400: 'bad-request',
  404: 'not-found',
  413: 'too-large',
  415: 'unsupported-type',
};

function describe(error: unknown): { name: string; status?: number } {
  if (!(error instanceof Error)) return { name: '' };
  const { status } = error as Error & { status?: unknown };
  return { name: error.name, status: typeof status === 'number' ? status : undefined };
}
