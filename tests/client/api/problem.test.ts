import { PROBLEMS } from '@/shared/contract';
import { ApiProblem, asProblem, problemIn } from '@/shared/client/api/problem';

const document = (code: string, status: number, extras: object = {}) => ({
  type: `urn:landfall:problem:${code}`,
  title: 'A title',
  status,
  ...extras,
});

describe('a problem of the server', () => {
  it.each(Object.entries(PROBLEMS))('%s keeps its code and status', (code, { status }) => {
    expect(problemIn(status, document(code, status))).toMatchObject({ code, status });
  });

  it.each([
    ['internal', 500, true],
    ['unavailable', 503, true],
    ['too-many-requests', 429, true],
    ['invalid', 422, false],
    ['changed-meanwhile', 412, false],
    ['forbidden', 403, false],
  ])('%s may be tried again: %p, %p', (code, status, isRetryable) => {
    expect(problemIn(status, document(code, status)).isRetryable).toBe(isRetryable);
  });

  it('gives the message of a field, the request id and what is stored now', () => {
    const problem = problemIn(
      422,
      document('invalid', 422, {
        instance: 'request-1',
        current: { version: 4 },
        errors: [{ path: 'values.axialLengthMm', code: 'custom', message: 'Axial length is missing' }],
      }),
    );

    expect(problem.messageFor('values.axialLengthMm')).toBe('Axial length is missing');
    expect(problem.messageFor('values.acdMm')).toBeUndefined();
    expect(problem.requestId).toBe('request-1');
    expect(problem.current).toEqual({ version: 4 });
  });

  it.each(['tea-time', 'toString', ''])('does not take the unknown code "%s" for a known one', (code) => {
    expect(problemIn(418, document(code, 418)).code).toBe('unreadable');
  });

  it('is unreadable when it is no problem document', () => {
    expect(problemIn(502, undefined)).toMatchObject({ code: 'unreadable', status: 502, isRetryable: true });
  });
});

describe('anything thrown', () => {
  it('stays itself when it is a problem', () => {
    const problem = new ApiProblem({ code: 'offline', status: 0, title: 'No answer' });
    expect(asProblem(problem)).toBe(problem);
  });

  it('becomes one when it is not', () => {
    expect(asProblem(new Error('no such element'))).toMatchObject({
      code: 'unreadable',
      detail: 'no such element',
      isRetryable: false,
    });
  });
});
