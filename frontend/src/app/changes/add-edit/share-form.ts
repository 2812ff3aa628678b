import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import type { Command, FlowRow } from '@shared/contract';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Control, Field } from '../../ui/field/field';

/** Proposes to adopt a proposed share into the budget of its parent. */
@Component({
  selector: 'dp-share-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field],
  template: `
    <form class="form" (submit)="send($event)">
      @if (shares().length > 0) {
        <dp-field label="Proposed share" [error]="asked() && !chosen() ? 'Choose the share to adopt.' : ''">
          <select dpControl #select [value]="id()" (change)="id.set(select.value)">
            <option value="">Choose one</option>
            @for (share of shares(); track share.id) {
              <option [value]="share.id">{{ share.text }}</option>
            }
          </select>
        </dp-field>
      } @else {
        <p class="faint">
          No share is proposed at present. A requirement in preparation is given a proposed share on the sheet of its
          parent.
        </p>
      }
      <ng-content />
    </form>
  `,
})
export class ShareForm {
  private readonly units = inject(UnitPreferences);
  readonly rows = input.required<readonly FlowRow[]>();
  readonly propose = output<Command>();

  protected readonly id = signal('');
  protected readonly asked = signal(false);
  protected readonly shares = computed(() => {
    const found = this.rows().flatMap(({ key, budget }) =>
      (budget?.shares ?? [])
        .filter(({ status }) => status === 'proposed')
        .map((share) => {
          const temperature = budget?.difference ? ('difference' as const) : ('absolute' as const);
          const size =
            share.value === null
              ? ''
              : ` ${this.units.show(share.value, share.unit ?? budget?.unit ?? '', { temperature })}`;
          return {
            id: share.traceId,
            version: share.traceVersion,
            text: `${share.key} ${share.title},${size} into the budget of ${key}`,
          };
        }),
    );
    return [...new Map(found.map((share) => [share.id, share])).values()];
  });
  protected readonly chosen = computed(() => this.shares().find(({ id }) => id === this.id()));

  protected send(event: Event): void {
    event.preventDefault();
    this.asked.set(true);
    const share = this.chosen();
    if (share !== undefined) this.propose.emit({ type: 'budget.adopt', id: share.id, version: share.version });
  }
}
