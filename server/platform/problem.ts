/** One thing that is wrong with a request, and where: `name` in the body, `query.limit`. */
export interface RequestFault {
  readonly path: string;
  readonly message: string;
}

/** Members beside those of RFC 9457: `faults` of an invalid request, both versions of a conflict. */
export type ProblemExtensions = Readonly<Record<string, unknown>>;

/**
 * A problem as RFC 9457 describes it. Thrown by use cases and policies, answered as
 * `application/problem+json` by the error handler.
 */
export class Problem extends Error {
  override readonly name = 'Problem';

  constructor(
    /** Stable name for programs, in kebab case; texts may change, codes may not. */
    readonly code: string,
    readonly status: number,
    readonly title: string,
    /** What is wrong and what to do, for people; the title where there is nothing more to say. */
    readonly detail: string = `${title}.`,
    readonly extensions: ProblemExtensions = {},
    readonly headers: Readonly<Record<string, string>> = {},
  ) {
    super(detail);
  }
}

export interface ProblemDetails {
  readonly type: string;
  readonly code: string;
  readonly title: string;
  readonly status: number;
  readonly detail: string;
  readonly requestId: string;
  readonly [extension: string]: unknown;
}

/** The body of the answer to a request that met the problem. */
export function problemDetails(problem: Problem, requestId: string): ProblemDetails {
  return {
    ...problem.extensions,
    type: `/problems/${problem.code}`,
    code: problem.code,
    title: problem.title,
    status: problem.status,
    detail: problem.detail,
    requestId,
  };
}

export type ProblemFactory = (detail?: string, extensions?: ProblemExtensions) => Problem;

/**
 * A kind of problem with its stable code. Features define theirs in X.errors.ts:
 *
 *     export const nameTaken = defineProblem({ code: 'product-name-taken', status: 409, title: '…' });
 *     throw nameTaken('Another product is called "Lift table".');
 */
export function defineProblem(kind: { code: string; status: number; title: string }): ProblemFactory {
  return (detail, extensions) => new Problem(kind.code, kind.status, kind.title, detail, extensions);
}

/** The first fault as text, and how many more there are. */
function faultText([first, ...more]: readonly RequestFault[]): string {
  const others = more.length > 0 ? ` And ${more.length} more.` : '';
  return `${first.path}: ${first.message}.${others}`;
}

/** @param faults at least one */
export function invalidRequest(faults: readonly RequestFault[]): Problem {
  return new Problem('invalid-request', 400, 'The request has faults', faultText(faults), { faults });
}

/**
 * A study that cannot be used.
 *
 * @param faults at least one, each with its path in the study
 */
export function studyUnusable(faults: readonly RequestFault[]): Problem {
  return new Problem('study-unusable', 422, 'The study cannot be used', faultText(faults), { faults });
}

export const malformedJson = defineProblem({
  code: 'malformed-json',
  status: 400,
  title: 'The body of the request is not JSON',
});

export const unauthenticated = defineProblem({
  code: 'unauthenticated',
  status: 401,
  title: 'Sign in first',
});

export const forbidden = defineProblem({
  code: 'forbidden',
  status: 403,
  title: 'Your role does not allow this',
});

export const originRefused = defineProblem({
  code: 'origin-refused',
  status: 403,
  title: 'The request does not come from a page of this server',
});

/** Also the answer about a thing that exists but is not for the caller's eyes. */
export const notFound = defineProblem({ code: 'not-found', status: 404, title: 'There is nothing here' });

export function methodNotAllowed(allowed: readonly string[]): Problem {
  const title = 'This cannot be done here';
  return new Problem('method-not-allowed', 405, title, undefined, {}, { Allow: allowed.join(', ') });
}

export const conflict = defineProblem({
  code: 'conflict',
  status: 409,
  title: 'It was changed in the meantime',
});

export const bodyTooLarge = defineProblem({
  code: 'body-too-large',
  status: 413,
  title: 'The body of the request is too large',
});

export const unsupportedMediaType = defineProblem({
  code: 'unsupported-media-type',
  status: 415,
  title: 'The body of the request must be application/json',
});

export const hostUnknown = defineProblem({
  code: 'host-unknown',
  status: 421,
  title: 'This server does not answer under that name',
});

/** @param seconds after which a new attempt is worth making */
export function tooManyRequests(seconds: number): Problem {
  return new Problem(
    'too-many-requests',
    429,
    'Too many attempts',
    `Try again in ${seconds} s.`,
    {},
    { 'Retry-After': String(seconds) },
  );
}

export const internalError = defineProblem({
  code: 'internal-error',
  status: 500,
  title: 'Something went wrong on the server',
});

export const unavailable = defineProblem({
  code: 'unavailable',
  status: 503,
  title: 'The server cannot do this at the moment',
});
