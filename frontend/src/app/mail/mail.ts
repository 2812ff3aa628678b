import { DatePipe } from '@angular/common';
import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import type { DemonstrationMail } from '@shared/contract';
import { load } from '../core/http/load';
import { TitleBlock } from '../core/title-block';
import { EmptyState } from '../ui/empty-state/empty-state';
import { Waiting } from '../ui/waiting/waiting';
import { MailText } from './mail-text';

/** The mails that the demonstration's own mail catcher holds, newest first. Nothing was sent outside. */
@Component({
  selector: 'dp-mail',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [DatePipe, EmptyState, MailText, Waiting],
  template: `
    <section class="sheet">
      <div class="sheet-head">
        <h1>Mail of the demonstration</h1>
        <p class="faint">
          Every mail that this server sent, to whomever. In demonstration mode they stay here and go nowhere else.
        </p>
      </div>
      @if (mails.value(); as answer) {
        @for (mail of answer.mails; track mail.id) {
          <article class="part thin">
            <h2>{{ mail.subject }}</h2>
            <p class="small faint">to {{ mail.to.join(', ') }} · {{ mail.at | date: 'd MMMM y, HH:mm:ss' }}</p>
            <dp-mail-text [text]="mail.text" />
          </article>
        } @empty {
          <dp-empty-state
            title="No mail yet."
            first="Invite a person or ask for a new password; the mail appears here."
          />
        }
      } @else {
        <dp-waiting [state]="mails" />
      }
    </section>
  `,
})
export class Mail {
  private readonly http = inject(HttpClient);
  protected readonly mails = load(
    () => 'mails',
    () => this.http.get<{ mails: readonly DemonstrationMail[] }>('/api/demo/mail'),
  );

  constructor() {
    inject(TitleBlock).register({
      name: () => 'Mail',
      actions: () => [{ label: 'Look again', main: true, run: () => this.mails.reload() }],
    });
  }
}
