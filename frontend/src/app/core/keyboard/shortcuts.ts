import { DOCUMENT, DestroyRef, Injectable, inject, signal } from '@angular/core';
import { fromEvent } from 'rxjs';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { storedSignal } from '../stored-signal';

/** A key and what it does. Without `run` it is only listed, for keys that a page handles itself. */
export interface Shortcut {
  readonly keys: string;
  readonly label: string;
  readonly group: string;
  readonly run?: () => void;
}

/** The keys that work now: the shell's own and those of the page that is open. */
@Injectable({ providedIn: 'root' })
export class Shortcuts {
  private readonly document = inject(DOCUMENT);
  private readonly known = signal<readonly Shortcut[]>([]);
  readonly all = this.known.asReadonly();
  /** Single characters can be switched off, for people whose speech or device input would trip them (WCAG 2.1.4). */
  readonly singleKeys = storedSignal('deltaproof.single-keys', true, (stored) =>
    typeof stored === 'boolean' ? stored : undefined,
  );

  constructor() {
    fromEvent<KeyboardEvent>(this.document, 'keydown')
      .pipe(takeUntilDestroyed())
      .subscribe((event) => this.press(event));
  }

  /** Adds keys until the caller is destroyed; the newest wins. Call it in an injection context or pass the owner. */
  register(shortcuts: readonly Shortcut[], owner: DestroyRef = inject(DestroyRef)): void {
    owner.onDestroy(this.add(shortcuts));
  }

  /** Adds keys and returns what removes them again. */
  add(shortcuts: readonly Shortcut[]): () => void {
    if (shortcuts.length > 0) this.known.update((known) => [...known, ...shortcuts]);
    return () => this.known.update((known) => known.filter((shortcut) => !shortcuts.includes(shortcut)));
  }

  /** Runs what a key press means; true when it meant something. */
  press(event: KeyboardEvent): boolean {
    if (event.defaultPrevented || event.isComposing) return false;
    const keys = keysOf(event);
    const single = !keys.includes('+') || keys === '+';
    if (single && (!this.singleKeys() || isTyping(event.target) || this.isDialogOpen())) return false;
    const shortcut = this.known().findLast(
      (known) => known.run !== undefined && known.keys.toLowerCase() === keys.toLowerCase(),
    );
    if (shortcut?.run === undefined) return false;
    event.preventDefault();
    shortcut.run();
    return true;
  }

  private isDialogOpen(): boolean {
    return this.document.querySelector('[role="dialog"], [role="alertdialog"], [role="menu"]') !== null;
  }
}

/** "n", "?", "Ctrl+k", "Ctrl+Enter"; the Command key counts as Ctrl. */
export function keysOf(event: KeyboardEvent): string {
  const held = [event.ctrlKey || event.metaKey ? 'Ctrl' : '', event.altKey ? 'Alt' : ''].filter((key) => key !== '');
  return [...held, event.key].join('+');
}

function isTyping(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  return (
    target.isContentEditable ||
    ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName) ||
    target.closest('[role="grid"], [role="treegrid"]') !== null
  );
}
