import { inject } from '@angular/core';
import { RedirectCommand, Router, type CanActivateFn } from '@angular/router';
import { map } from 'rxjs';
import { paths } from '../paths';
import { SessionStore } from './session-store';

/** Strangers are sent to sign in and come back to where they were going. */
export const signedInOnly: CanActivateFn = (_route, state) => {
  const router = inject(Router);
  return inject(SessionStore).ready.pipe(
    map(({ person }) =>
      person ? true : router.createUrlTree([paths.signIn], { queryParams: { back: state.url } }),
    ),
  );
};

/** Who is signed in already has no business at the sign-in page. */
export const strangersOnly: CanActivateFn = () => {
  const router = inject(Router);
  return inject(SessionStore).ready.pipe(
    map(({ person }) => (person ? router.parseUrl(paths.boards) : true)),
  );
};

export const administratorsOnly: CanActivateFn = () => onlyIf((session) => session.may('people.list'));

export const demonstrationOnly: CanActivateFn = () => onlyIf((session) => session.demonstration());

/** Shows the not-found page under the address asked for: what one may not see is not there. */
function onlyIf(allowed: (session: SessionStore) => boolean) {
  const session = inject(SessionStore);
  const router = inject(Router);
  return session.ready.pipe(
    map(() =>
      allowed(session)
        ? true
        : new RedirectCommand(router.parseUrl('/not-found'), { skipLocationChange: true }),
    ),
  );
}
