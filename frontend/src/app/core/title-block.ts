import { DestroyRef, Injectable, type Signal, computed, inject, signal } from '@angular/core';

/** Something a person can do with the sheet that is open. The main one stands last, in cobalt. */
export interface SheetAction {
  readonly label: string;
  readonly run: () => void;
  readonly main?: boolean;
  readonly disabled?: boolean;
  /** Why it cannot be done now; shown with the disabled action. */
  readonly reason?: string;
  /** Key that does the same, for instance "n" or "Ctrl+Enter". */
  readonly shortcut?: string;
}

/** What a page tells the title block about itself; both are read as signals. */
export interface SheetEntry {
  /** Key of the sheet, such as VEH-001; undefined on a page that shows many. */
  readonly name?: () => string | undefined;
  readonly actions?: () => readonly SheetAction[];
}

/** Collects the name and the actions of the page that is open; the newest page speaks. */
@Injectable({ providedIn: 'root' })
export class TitleBlock {
  private readonly entries = signal<readonly SheetEntry[]>([]);
  private readonly speaking = computed(() => this.entries().at(-1));

  readonly sheetName: Signal<string | undefined> = computed(() => this.speaking()?.name?.());
  /** The actions in the order they are shown: main ones last. */
  readonly actions: Signal<readonly SheetAction[]> = computed(() => {
    const actions = this.speaking()?.actions?.() ?? [];
    return [...actions.filter((action) => !action.main), ...actions.filter((action) => action.main)];
  });

  /** Registers the calling page until it is destroyed; call it in a constructor or field initializer. */
  register(entry: SheetEntry): void {
    this.entries.update((entries) => [...entries, entry]);
    inject(DestroyRef).onDestroy(() => this.entries.update((entries) => entries.filter((other) => other !== entry)));
  }
}
