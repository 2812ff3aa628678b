import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { load } from '../core/http/load';
import { Waiting } from '../ui/waiting/waiting';
import { StudiesApi } from './studies-api';

/** The studies a person takes part in. */
@Component({
  selector: 'dp-studies',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink, Waiting],
  template: `
    <section class="sheet">
      <div class="sheet-head"><h1>Studies</h1></div>
      @if (studies.value(); as list) {
        <ul class="rows">
          @for (study of list; track study.key) {
            <li>
              <a [routerLink]="['/studies', study.key]">{{ study.name }}</a>
              <span class="faint">{{ study.summary }}</span>
            </li>
          }
        </ul>
      } @else {
        <dp-waiting [state]="studies" />
      }
    </section>
  `,
})
export class Studies {
  private readonly api = inject(StudiesApi);
  protected readonly studies = load(
    () => 'studies',
    () => this.api.list(),
  );
}
