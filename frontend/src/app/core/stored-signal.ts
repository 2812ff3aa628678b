import { type WritableSignal, effect, signal } from '@angular/core';

/** A signal kept in localStorage under `key`; a stored value that `read` does not accept is forgotten. Needs an injection context. */
export function storedSignal<T>(key: string, initial: T, read: (stored: unknown) => T | undefined): WritableSignal<T> {
  const state = signal(readStored(key, read) ?? initial);
  effect(() => {
    const value = state();
    try {
      localStorage.setItem(key, JSON.stringify(value));
    } catch {
      // Storage full or forbidden: the choice then lasts as long as the page.
    }
  });
  return state;
}

function readStored<T>(key: string, read: (stored: unknown) => T | undefined): T | undefined {
  try {
    const text = localStorage.getItem(key);
    return text === null ? undefined : read(JSON.parse(text));
  } catch {
    return undefined;
  }
}
