/**
 * Errors as RFC 9457 problem details: one closed list of codes, each with its status and title.
 */
import { z } from 'zod';

export const PROBLEMS = {
  'bad-request': { status: 400, title: 'The request could not be read' },
  unauthenticated: { status: 401, title: 'Sign in first' },
  'wrong-credentials': { status: 401, title: 'E-mail and password do not match an active account' },
  forbidden: { status: 403, title: 'Your role does not allow this' },
  'wrong-password': { status: 403, title: 'The password is not right' },
  'not-found': { status: 404, title: 'Not found' },
  conflict: { status: 409, title: 'This does not fit what is already stored' },
  'link-expired': { status: 410, title: 'This link has expired or was used already' },
  'changed-meanwhile': { status: 412, title: 'Somebody changed this meanwhile' },
  'too-large': { status: 413, title: 'The upload is too large' },
  'unsupported-type': { status: 415, title: 'This kind of content is not accepted' },
  invalid: { status: 422, title: 'Some values cannot be accepted' },
  'idempotency-mismatch': { status: 422, title: 'This request key was used for something else' },
  'if-match-required': { status: 428, title: 'Say which version you changed' },
  'too-many-requests': { status: 429, title: 'Too many attempts; wait a little' },
  internal: { status: 500, title: 'Something went wrong on our side' },
  unavailable: { status: 503, title: 'The service is not ready' },
} as const;

export type ProblemCode = keyof typeof PROBLEMS;

export const fieldErrorSchema = z.object({
  /** Path of the field, dotted: `values.axialLengthMm`. */
  path: z.string(),
  code: z.string(),
  message: z.string(),
});
export type FieldError = z.infer<typeof fieldErrorSchema>;

export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string().optional(),
  /** The request id, to quote when asking for help. */
  instance: z.string().optional(),
  errors: z.array(fieldErrorSchema).optional(),
  /** On 412: what is stored now. */
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof problemSchema>;

export const PROBLEM_TYPE_PREFIX = 'urn:landfall:problem:';
