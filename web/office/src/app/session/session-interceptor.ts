import { HttpErrorResponse, type HttpInterceptorFn } from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, throwError } from 'rxjs';
import { SessionApi } from './session-api';

/**
 * A session that ended meanwhile (401) leads to the sign-in page and back to where the person was.
 * `/api/session` itself is left alone: there 401 means "nobody signed in" or "wrong password", which its callers say.
 */
export const sessionInterceptor: HttpInterceptorFn = (request, next) => {
  const router = inject(Router);
  const api = inject(SessionApi);
  return next(request).pipe(
    catchError((error: unknown) => {
      if (error instanceof HttpErrorResponse && error.status === 401 && request.url !== '/api/session') {
        api.forget();
        void router.navigate(['/sign-in'], { queryParams: { returnPath: router.url } });
      }
      return throwError(() => error);
    }),
  );
};
