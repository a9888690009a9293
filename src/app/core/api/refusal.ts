import { HttpErrorResponse } from '@angular/common/http';
import type { Problem } from '../../../../shared/contracts/api';
import type { Failure } from '../../ui/states';
import { failureOf, problemOf } from './failure';

/** An act that did not happen. */
export class Refusal extends Error {
  constructor(
    readonly failure: Failure,
    readonly status: number,
    readonly problem: Problem | undefined,
  ) {
    super(failure.title);
    this.name = 'Refusal';
  }

  static of(error: unknown): Refusal {
    const status = error instanceof HttpErrorResponse ? error.status : 0;
    return new Refusal(failureOf(error, 'this'), status, problemOf(error));
  }
}

/** One sentence on why an act did not happen, for a form or a notice. */
export function refusalText(error: unknown): string {
  if (!(error instanceof Refusal)) return 'This did not work. Try again.';
  const { status, problem, failure } = error;
  if (status === 403) return 'You may not do this. Ask an administrator for the role.';
  const { title, detail } = problem !== undefined && status < 500 ? problem : failure;
  return detail === '' ? `${title}.` : `${title}. ${detail}`;
}
