import { inject } from '@angular/core';
import { Router } from '@angular/router';

/**
 * Writes filters into the address of the page, so that they can be linked to and survive a reload; an empty value leaves
 * the address. The page reads them back as inputs. Call it in an injection context.
 */
export function addressWriter(): (params: Readonly<Record<string, string | undefined>>) => void {
  const router = inject(Router);
  return (params) => {
    const queryParams = Object.fromEntries(Object.entries(params).map(([name, value]) => [name, value || null]));
    void router.navigate([], { queryParams, queryParamsHandling: 'merge', replaceUrl: true });
  };
}

/** True when every word of `typed` occurs in one of the texts, whatever the case. */
export function matchesWords(typed: string, ...texts: readonly string[]): boolean {
  const text = texts.join('\n').toLowerCase();
  return typed
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word));
}
