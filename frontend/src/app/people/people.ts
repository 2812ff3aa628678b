import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { load } from '../core/http/load';
import { Waiting } from '../ui/waiting/waiting';
import { PeopleApi } from './people-api';

/** People as the administrator sees them. */
@Component({
  selector: 'dp-people',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Waiting],
  template: `
    <section class="sheet">
      <div class="sheet-head"><h1>People</h1></div>
      @if (people.value(); as answer) {
        <ul class="rows">
          @for (person of answer.people; track person.id) {
            <li>
              {{ person.name }} <span class="faint">{{ person.email }}</span>
            </li>
          }
        </ul>
      } @else {
        <dp-waiting [state]="people" />
      }
    </section>
  `,
})
export class People {
  private readonly api = inject(PeopleApi);
  protected readonly people = load(
    () => 'people',
    () => this.api.people(),
  );
}
