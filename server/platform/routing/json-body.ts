import express, { type Request, type Response } from 'express';
import { bodyTooLarge, malformedJson, type Problem, unsupportedMediaType } from '../problem';

export const LARGEST_BODY_BYTES = 1024 * 1024;

const parse = express.json({ limit: LARGEST_BODY_BYTES, type: 'application/json', strict: true });

/** What a failure of the reader is called; anything else is passed on. */
function asProblem(error: unknown): Problem | undefined {
  if (!(error instanceof Error) || !('type' in error)) return undefined;
  switch (error.type) {
    case 'entity.too.large':
      return bodyTooLarge(`The limit is ${LARGEST_BODY_BYTES} bytes.`);
    case 'entity.parse.failed':
    case 'request.aborted':
    case 'request.size.invalid':
      return malformedJson();
    case 'encoding.unsupported':
    case 'charset.unsupported':
      return unsupportedMediaType();
    default:
      return undefined;
  }
}

function hasBody(request: Request): boolean {
  return request.get('transfer-encoding') !== undefined || Number(request.get('content-length') ?? 0) > 0;
}

/**
 * Reads the JSON body of a request; called after the policy, so that nobody makes the server read what they may
 * not send.
 *
 * @returns undefined where there is none
 * @throws Problem for a body that is not JSON, not called JSON, or too large
 */
export async function readJsonBody(request: Request, response: Response): Promise<unknown> {
  if (!hasBody(request)) return undefined;
  if (request.is('application/json') === false) throw unsupportedMediaType();
  await new Promise<void>((resolve, reject) => {
    parse(request, response, (error?: unknown) => {
      if (error === undefined) resolve();
      else reject(asProblem(error) ?? (error instanceof Error ? error : new Error('unreadable body')));
    });
  });
  return request.body as unknown;
}
