import type { ErrorRequestHandler } from 'express';
import { internalError, notFound, Problem, problemDetails } from '../problem';
import { requestContext } from './request-context';

/** Faults that Express itself finds in an address. */
function isBadAddress(error: unknown): boolean {
  return error instanceof URIError;
}

/**
 * Answers whatever was thrown as `application/problem+json`. What is not a known problem is logged with its
 * cause, and answered without it.
 */
export const answerProblems: ErrorRequestHandler = (error: unknown, _request, response, next) => {
  const { requestId, log } = requestContext(response);
  if (response.headersSent) {
    log.error({ error }, 'failed while answering');
    next(error);
    return;
  }
  const known = error instanceof Problem ? error : isBadAddress(error) ? notFound() : undefined;
  if (known === undefined) log.error({ error }, 'request failed');
  const problem = known ?? internalError();
  response
    .status(problem.status)
    .set(problem.headers)
    .type('application/problem+json')
    .send(JSON.stringify(problemDetails(problem, requestId)));
};
