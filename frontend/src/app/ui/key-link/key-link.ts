import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

/** The key of an item in mono cobalt, leading to its sheet; with its title beside it when given. */
@Component({
  selector: 'dp-key-link',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <a [routerLink]="to()" [queryParams]="params()" queryParamsHandling="merge"
      ><span class="key">{{ key() }}</span></a
    >
    @if (title()) {
      <span class="title">{{ title() }}</span>
    }
  `,
  styles: `
    a {
      font-weight: 400;
    }
    .title {
      margin-left: 0.45em;
    }
  `,
})
export class KeyLink {
  readonly key = input.required<string>();
  /** Router commands: context.link('requirements', key). */
  readonly to = input.required<readonly string[]>();
  readonly params = input<Readonly<Record<string, string>>>({});
  readonly title = input('');
}
