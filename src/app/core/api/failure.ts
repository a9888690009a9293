import { HttpErrorResponse } from '@angular/common/http';
import { problemSchema, type Problem } from '../../../../shared/contracts/api';
import type { Failure } from '../../ui/states';

/** The problem details of an answer, where it has any. */
export function problemOf(error: unknown): Problem | undefined {
  if (!(error instanceof HttpErrorResponse)) return undefined;
  const read = problemSchema.safeParse(bodyOf(error));
  return read.success ? read.data : undefined;
}

/** What went wrong in the words of the page. `what` names the thing that was asked for: "this product". */
export function failureOf(error: unknown, what: string): Failure {
  if (!(error instanceof HttpErrorResponse)) {
    return {
      kind: 'broken',
      title: 'The answer could not be read',
      detail: 'This page may be older than the server. Reload it in the browser.',
    };
  }
  const problem = problemOf(error);
  const requestId = problem?.requestId === undefined ? {} : { requestId: problem.requestId };
  switch (error.status) {
    case 0:
      return {
        kind: 'unreachable',
        title: 'The server does not answer',
        detail: 'Check the connection, then try again. Nothing that was saved is lost.',
      };
    case 401:
      return { kind: 'forbidden', title: 'You are signed out', detail: 'Sign in to go on.' };
    case 403:
      return {
        kind: 'forbidden',
        title: `You may not see ${what}`,
        detail: 'Ask an administrator or a designer of the product for a role in it.',
      };
    case 404:
      return {
        kind: 'missing',
        title: 'There is nothing here',
        detail: `The address is wrong, or ${what} was deleted, or you have no role in it.`,
      };
    default:
      return error.status >= 500
        ? {
            kind: 'broken',
            title: 'The server failed',
            detail: 'Try again in a moment. If it stays, tell an administrator the request below.',
            ...requestId,
          }
        : {
            kind: 'refused',
            title: problem?.title ?? 'The server refused this',
            detail: problem?.detail ?? `It answered with status ${error.status}.`,
            ...requestId,
          };
  }
}

/** The body of a failed request is text where the request asked for none. */
function bodyOf(error: HttpErrorResponse): unknown {
  const body: unknown = error.error;
  if (typeof body !== 'string') return body;
  try {
    return JSON.parse(body);
  } catch {
    return body;
  }
}
