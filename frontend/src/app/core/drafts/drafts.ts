import { type DestroyRef, Injectable, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { type AbstractControl } from '@angular/forms';
import { debounceTime } from 'rxjs';
import { SessionStore } from '../session/session-store';

const PREFIX = 'deltaproof.draft';
const PAUSE = 300;

/** What a form was last left with, kept on this device per person until it is given to the server or thrown away. */
@Injectable({ providedIn: 'root' })
export class Drafts {
  private readonly session = inject(SessionStore);

  /** Keeps a value under `key`; null forgets it. */
  autosave(key: string, value: unknown): void {
    try {
      if (value === null || value === undefined) localStorage.removeItem(this.slot(key));
      else localStorage.setItem(this.slot(key), JSON.stringify(value));
    } catch {
      // Storage full or forbidden: the text still stands in the form itself.
    }
  }

  /** What was kept under `key`, or null. The caller checks its shape, since an older version may have written it. */
  saved(key: string): unknown {
    try {
      const text = localStorage.getItem(this.slot(key));
      return text === null ? null : JSON.parse(text);
    } catch {
      return null;
    }
  }

  discard(key: string): void {
    this.autosave(key, null);
  }

  /** Fills a form with what was kept and keeps what is typed from now on. Returns true when there was something. */
  follow(key: string, form: AbstractControl, owner: DestroyRef): boolean {
    const saved = this.saved(key);
    if (typeof saved === 'object' && saved !== null) {
      form.patchValue(saved);
      form.markAsDirty();
    }
    form.valueChanges.pipe(debounceTime(PAUSE), takeUntilDestroyed(owner)).subscribe(() => {
      if (form.dirty) this.autosave(key, form.getRawValue());
    });
    return saved !== null;
  }

  private slot(key: string): string {
    return `${PREFIX}.${this.session.person()?.id ?? 'nobody'}.${key}`;
  }
}
