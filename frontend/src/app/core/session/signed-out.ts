import { Injectable } from '@angular/core';
import { Subject } from 'rxjs';

/** Carries the news that the server no longer knows us from the HTTP layer to the session, without a cycle between them. */
@Injectable({ providedIn: 'root' })
export class SignedOut {
  private readonly subject = new Subject<void>();
  readonly announcements = this.subject.asObservable();

  announce(): void {
    this.subject.next();
  }
}
