/** Bounds what one address may ask of the public part of the API, where each request can cost a password hash. */
import type { RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';
import { sendProblem } from '@/server/http/error-handler';
import { ProblemError } from '@/server/http/problem';

const WINDOW_MS = 60_000;

export function publicRateLimit(requestsPerMinute: number): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MS,
    limit: requestsPerMinute,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_request, response) =>
      sendProblem(
        response,
        new ProblemError('too-many-requests', undefined, { retryAfterS: WINDOW_MS / 1000 }),
      ),
  });
}
