import { inject } from '@angular/core';
import { type CanActivateFn, type CanMatchFn, Router, type RedirectFunction } from '@angular/router';
import { navigationFor } from '../shell/navigation';
import { SessionApi } from './session-api';

/** Lets signed-in people in; sends everyone else to the sign-in page, with the way back. */
export const signedIn: CanActivateFn = async (_route, state) => {
  const router = inject(Router);
  const session = await inject(SessionApi)
    .load()
    .catch(() => null);
  return session ? true : router.createUrlTree(['/sign-in'], { queryParams: state.url === '/' ? {} : { returnPath: state.url } });
};

/** Whether the person's role may open this subject, by the navigation list. The server decides again on every request. */
export const mayOpen: CanMatchFn = async (route) => {
  const session = await inject(SessionApi)
    .load()
    .catch(() => null);
  // Nobody signed in: match, so that `signedIn` can ask for it and remember the way back.
  return !session || navigationFor(session.role).some((entry) => entry.path === route.path);
};

/** The first page of a role: the first entry of its navigation that exists. Redirects come before guards, so it asks by itself. */
export const toFirstPage: RedirectFunction = async () => {
  const router = inject(Router);
  const session = await inject(SessionApi)
    .load()
    .catch(() => null);
  if (!session) return router.parseUrl('/sign-in');
  const [first] = navigationFor(session.role, router.config);
  return router.parseUrl(first ? `/${first.path}` : '/account');
};
