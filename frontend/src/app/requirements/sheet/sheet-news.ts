import { DestroyRef, Injectable, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import type { StudyEvent } from '@shared/contract';
import { LiveUpdates } from '../../core/live/live-updates';
import { SessionStore } from '../../core/session/session-store';

/** What others have just done to the requirement that is open. */
@Injectable()
export class SheetNews {
  private readonly me = inject(SessionStore).person;
  private readonly newest = signal<StudyEvent | null>(null);
  /** The newest edit by somebody else; the page shows it where it bears on the sheet. */
  readonly event = this.newest.asReadonly();

  constructor() {
    inject(LiveUpdates)
      .events.pipe(takeUntilDestroyed(inject(DestroyRef)))
      .subscribe((event) => {
        if (event.byId !== this.me()?.id) this.newest.set(event);
      });
  }

  dismiss(): void {
    this.newest.set(null);
  }
}

/** What an edit did to one requirement, in a sentence; null when it did nothing to it. */
export function newsOf(event: StudyEvent, key: string): string | null {
  const move = event.moved.find((one) => one.key === key);
  if (move === undefined && !event.touched.includes(key)) return null;
  const isTurned = move !== undefined && move.from !== move.to && move.from !== null && move.to !== null;
  const effect = isTurned
    ? ` The verdict turned from ${move.from} to ${move.to}.`
    : move === undefined
      ? ''
      : ' The computed value moved, the verdict stands.';
  const did = event.summary.replace(/\.$/, '');
  return `${event.by}, r${event.revision}: ${did}.${effect}`;
}
