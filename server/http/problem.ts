/** The one kind of error that services throw. It becomes an RFC 9457 problem in `error-handler.ts`. */
import type { ZodError } from 'zod';
import {
  PROBLEM_TYPE_PREFIX,
  PROBLEMS,
  type FieldError,
  type Problem,
  type ProblemCode,
} from '@/shared/contract';

export interface ProblemExtras {
  /** On 412: what is stored now. */
  current?: unknown;
  retryAfterS?: number;
}

export class ProblemError extends Error {
  readonly code: ProblemCode;
  readonly detail: string | undefined;
  readonly fields: FieldError[] | undefined;
  readonly extras: ProblemExtras;

  constructor(
    code: ProblemCode,
    detail?: string,
    { fields, ...extras }: ProblemExtras & { fields?: FieldError[] } = {},
  ) {
    super(detail ?? PROBLEMS[code].title);
    this.name = 'ProblemError';
    this.code = code;
    this.detail = detail;
    this.fields = fields;
    this.extras = extras;
  }

  toProblem(requestId: string): Problem {
    const { status, title } = PROBLEMS[this.code];
    return {
      type: PROBLEM_TYPE_PREFIX + this.code,
      title,
      status,
      ...(this.detail === undefined ? {} : { detail: this.detail }),
      instance: requestId,
      ...(this.fields === undefined ? {} : { errors: this.fields }),
      ...(this.extras.current === undefined ? {} : { current: this.extras.current }),
    };
  }
}

/** A problem with one field, found by a rule that the schema cannot know. */
export function invalidField(path: string, message: string): ProblemError {
  return new ProblemError('invalid', undefined, { fields: [{ path, code: 'custom', message }] });
}

/** A value that must be unique and is taken. */
export function takenField(path: string, message: string): ProblemError {
  return new ProblemError('conflict', message, { fields: [{ path, code: 'taken', message }] });
}

export function problemFromZod(error: ZodError): ProblemError {
  const fields = error.issues.map((issue) => ({
    path: issue.path.map(String).join('.'),
    code: issue.code ?? 'custom',
    message: issue.message,
  }));
  return new ProblemError('invalid', undefined, { fields });
}
