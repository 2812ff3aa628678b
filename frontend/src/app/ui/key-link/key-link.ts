import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, RouterLink } from '@angular/router';

/** The key of an item in mono cobalt, leading to its sheet; with its title beside it when given. */
@Component({
  selector: 'dp-key-link',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <a [routerLink]="to()" [queryParams]="query()"
      ><span class="key">{{ key() }}</span></a
    >
    @if (title()) {
      <span class="title">{{ title() }}</span>
    }
  `,
  styles: `
    a {
      font-family: var(--mono);
      font-weight: 400;
      letter-spacing: 0;
      text-decoration: none;
    }
    a:hover {
      text-decoration: underline;
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

  private readonly address = toSignal(inject(ActivatedRoute).queryParamMap);
  /** A link leads to the item as seen from the same standpoint; filters of the page it stands on stay behind. */
  protected readonly query = computed(() => {
    const at = this.address()?.get('at') ?? null;
    return at === null ? this.params() : { at, ...this.params() };
  });
}
