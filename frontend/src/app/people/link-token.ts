import { DOCUMENT, inject } from '@angular/core';

/**
 * The one-time code of a mailed link, taken from the address and then removed from it, so that it stays in no history,
 * screenshot or referrer. Links carry it behind `#`, which browsers send to no server.
 */
export function takeLinkToken(): string | null {
  const document = inject(DOCUMENT);
  const { hash, pathname } = document.location;
  const token = hash.slice(1);
  if (token === '') return null;
  document.defaultView?.history.replaceState(null, '', pathname);
  return token;
}
