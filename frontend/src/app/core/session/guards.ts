import { inject } from '@angular/core';
import { type CanActivateFn, Router } from '@angular/router';
import { SessionStore } from './session-store';

/** Lets signed-in people through; sends others to sign in and back here afterwards. */
export const signedIn: CanActivateFn = async (_route, state) => {
  const router = inject(Router);
  const person = await inject(SessionStore).whoAmI();
  return person !== null || router.createUrlTree(['/sign-in'], { queryParams: { from: state.url } });
};

/** Lets administrators through; others see the studies. The server refuses them anyway. */
export const administrator: CanActivateFn = async () => {
  const router = inject(Router);
  const person = await inject(SessionStore).whoAmI();
  return person?.administrator === true || router.createUrlTree(['/']);
};
