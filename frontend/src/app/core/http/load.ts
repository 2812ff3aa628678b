import { type Signal, computed, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { type Observable, catchError, map, of, startWith, switchMap } from 'rxjs';
import { type ProblemError, toProblem } from './problem-error';

/** What a view knows of something it reads: the value so far, whether it is being read, and why it could not be. */
export interface ViewState<T> {
  readonly value: Signal<T | undefined>;
  readonly loading: Signal<boolean>;
  readonly error: Signal<ProblemError | undefined>;
  /** Reads again with the same key. */
  reload(): void;
  /** Puts a value in place of the one read, for instance the answer to an edit. */
  set(value: T): void;
}

export interface LoadOptions<K> {
  /** True when the value read for `previous` must not be shown while `next` is being read (another item, not a newer state). */
  readonly discard?: (previous: K, next: K) => boolean;
}

interface Snapshot<T> {
  readonly value: T | undefined;
  readonly loading: boolean;
  readonly error: ProblemError | undefined;
}

/**
 * Reads whenever `key()` changes (compared by content) and keeps the previous value on screen meanwhile. While `key()`
 * is undefined nothing is read. Call it where injection is possible (a field initializer); it ends with its owner.
 */
export function load<K, T>(
  key: () => K | undefined,
  read: (key: K) => Observable<T>,
  options: LoadOptions<K> = {},
): ViewState<T> {
  // The key is not asked for yet: required inputs that it may read are set only after construction.
  const state = signal<Snapshot<T>>({ value: undefined, loading: true, error: undefined });
  const again = signal(0);
  const asked = computed(() => ({ key: key(), again: again() }), {
    equal: (a, b) => JSON.stringify(a) === JSON.stringify(b),
  });
  let previous: K | undefined;

  toObservable(asked)
    .pipe(
      switchMap(({ key }): Observable<Snapshot<T>> => {
        if (key === undefined) return of({ value: undefined, loading: false, error: undefined });
        const kept = previous !== undefined && options.discard?.(previous, key) ? undefined : state().value;
        previous = key;
        return read(key).pipe(
          map((value) => ({ value, loading: false, error: undefined })),
          catchError((error: unknown) => of({ value: kept, loading: false, error: toProblem(error) })),
          startWith({ value: kept, loading: true, error: undefined }),
        );
      }),
      takeUntilDestroyed(),
    )
    .subscribe((snapshot) => state.set(snapshot));

  return {
    value: computed(() => state().value),
    loading: computed(() => state().loading),
    error: computed(() => state().error),
    reload: () => again.update((count) => count + 1),
    set: (value) => state.set({ value, loading: false, error: undefined }),
  };
}
