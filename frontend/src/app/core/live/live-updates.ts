import { InjectionToken, Injectable, type Signal, inject, signal } from '@angular/core';
import type { StudyEvent } from '@shared/contract';
import { type Observable, Subject, type Subscription } from 'rxjs';
import { parseStudyEvent } from './study-event';
import { sharedStream } from './shared-stream';

/** Opens the stream behind live updates; replaced in specs. */
export const LIVE_STREAM = new InjectionToken<(url: string) => Observable<string>>('live stream', {
  providedIn: 'root',
  factory: () => sharedStream,
});

/** Edits of the open study as they are accepted, whoever makes them. */
@Injectable({ providedIn: 'root' })
export class LiveUpdates {
  private readonly open = inject(LIVE_STREAM);
  private readonly newest = signal(0);
  private readonly subject = new Subject<StudyEvent>();
  private subscription: Subscription | undefined;
  private study: string | undefined;

  /** The newest revision heard of; 0 until the first. Each view that shows study content reads again when it grows. */
  readonly revision: Signal<number> = this.newest.asReadonly();
  readonly events: Observable<StudyEvent> = this.subject.asObservable();

  /** Listens to one study, or to none. */
  follow(study: string | undefined): void {
    if (study === this.study) return;
    this.study = study;
    this.subscription?.unsubscribe();
    this.newest.set(0);
    if (study === undefined) return;
    this.subscription = this.open(`/api/studies/${encodeURIComponent(study)}/events`).subscribe((data) => {
      const event = parseStudyEvent(data);
      if (event === null) return;
      this.saw(event.revision);
      // The stream opens with the bare revision that stands; only what carries an author is an edit.
      if (event.byId !== '') this.subject.next(event);
    });
  }

  /** Tells of a revision learned otherwise: the answer to one's own edit, or a read that was newer than the stream. */
  saw(revision: number): void {
    if (revision > this.newest()) this.newest.set(revision);
  }
}
