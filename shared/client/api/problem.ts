/** What can go wrong with a call, as one closed type: a problem of the server, or no answer at all. */
import { problemSchema, PROBLEMS, PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import type { FieldError, ProblemCode } from '@/shared/contract';

export type ApiProblemCode = ProblemCode | 'offline' | 'unreadable';

export class ApiProblem extends Error {
  readonly code: ApiProblemCode;
  readonly status: number;
  readonly title: string;
  readonly detail: string | undefined;
  readonly errors: FieldError[];
  readonly requestId: string | undefined;
  /** On "changed meanwhile": what is stored now. */
  readonly current: unknown;
  /** True when the same call may succeed later. */
  readonly isRetryable: boolean;

  constructor(parts: {
    code: ApiProblemCode;
    status: number;
    title: string;
    detail?: string;
    errors?: FieldError[];
    requestId?: string;
    current?: unknown;
  }) {
    super(parts.title);
    this.code = parts.code;
    this.status = parts.status;
    this.title = parts.title;
    this.detail = parts.detail;
    this.errors = parts.errors ?? [];
    this.requestId = parts.requestId;
    this.current = parts.current;
    this.isRetryable = parts.code === 'offline' || parts.status >= 500 || parts.status === 429;
  }

  /** The message for one field, by its path. */
  messageFor(path: string): string | undefined {
    return this.errors.find((error) => error.path === path)?.message;
  }
}

export const OFFLINE = new ApiProblem({
  code: 'offline',
  status: 0,
  title: 'No answer from the server',
  detail: 'Check the connection and try again. Nothing was lost on this page.',
});

/** A reply that is not what was agreed: nothing in it is used. */
export function unreadable({ status, requestId }: { status: number; requestId?: string }): ApiProblem {
  const title = 'The server answered in an unexpected way';
  return new ApiProblem({ code: 'unreadable', status, title, requestId });
}

/** Reads a problem document; anything else becomes "unreadable" with its status. */
export async function problemOf(response: Response): Promise<ApiProblem> {
  const body: unknown = await response.json().catch(() => undefined);
  return problemIn(response.status, body);
}

export function problemIn(status: number, body: unknown): ApiProblem {
  const parsed = problemSchema.safeParse(body);
  if (!parsed.success) return unreadable({ status });
  const { type, title, detail, instance, errors, current } = parsed.data;
  return new ApiProblem({ code: codeIn(type), status, title, detail, errors, requestId: instance, current });
}

/** A code that this page does not know yet, say from a newer server, is not taken for one that it knows. */
function codeIn(type: string): ApiProblemCode {
  const name = type.startsWith(PROBLEM_TYPE_PREFIX) ? type.slice(PROBLEM_TYPE_PREFIX.length) : '';
  return Object.hasOwn(PROBLEMS, name) ? (name as ProblemCode) : 'unreadable';
}

/** Any thrown value as a problem, so that a screen has one thing to show. */
export function asProblem(error: unknown): ApiProblem {
  if (error instanceof ApiProblem) return error;
  return new ApiProblem({
    code: 'unreadable',
    status: 0,
    title: 'Something went wrong on this page',
    detail: error instanceof Error ? error.message : undefined,
  });
}
