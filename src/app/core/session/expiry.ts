import { HttpErrorResponse, type HttpInterceptorFn } from '@angular/common/http';
import { Injector, inject } from '@angular/core';
import { tap } from 'rxjs';
import { Session } from './session';

/** What answers 401 without meaning that a session has ended: asking for it, and a wrong password. */
const OWN_ANSWERS = ['/api/session', '/api/session/password'];

export const sessionExpiry: HttpInterceptorFn = (request, next) => {
  // The session uses the client that this stands in: it is looked up when it is needed.
  const injector = inject(Injector);
  return next(request).pipe(
    tap({
      error: (error: unknown) => {
        if (!(error instanceof HttpErrorResponse) || error.status !== 401) return;
        if (OWN_ANSWERS.includes(request.url)) return;
        void injector.get(Session).expire();
      },
    }),
  );
};
