import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

/** Shown for an address that leads nowhere. */
@Component({
  selector: 'dp-not-found',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <section class="sheet">
      <h1>There is no sheet at this address.</h1>
      <p class="lead">It may have been mistyped. <a routerLink="/">Go to the studies</a> and open it from there.</p>
    </section>
  `,
})
export class NotFound {}
