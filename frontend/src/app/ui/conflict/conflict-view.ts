import { ChangeDetectionStrategy, Component, computed, input, linkedSignal, output } from '@angular/core';
import { MatButton } from '@angular/material/button';

/** One field that both sides changed, or only one: as it was, as it stands now, as I typed it. */
export interface ConflictField {
  readonly field: string;
  readonly label: string;
  readonly theirs: string;
  readonly mine: string;
}

/** Which side stands for a field. */
export type Side = 'theirs' | 'mine';

/** Shows what stands now beside what I typed, field by field, and lets me choose. Nothing is lost until I do. */
@Component({
  selector: 'dp-conflict-view',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  template: `
    <div role="alert">
      <strong>{{ what() }} has changed since you opened it.</strong>
      Choose for each field what shall stand; nothing has been applied yet.
    </div>
    <table class="ruled">
      <thead>
        <tr>
          <th scope="col">Field</th>
          <th scope="col">As it stands{{ by() ? ', by ' + by() : '' }}</th>
          <th scope="col">As you typed it</th>
        </tr>
      </thead>
      <tbody>
        @for (field of differing(); track field.field) {
          <tr>
            <th scope="row">{{ field.label }}</th>
            @for (side of sides; track side) {
              <td [class.chosen]="chosen()[field.field] === side">
                <label class="choice">
                  <input
                    type="radio"
                    [name]="'conflict-' + field.field"
                    [checked]="chosen()[field.field] === side"
                    (change)="choose(field.field, side)"
                  />
                  <span class="words">{{ (side === 'mine' ? field.mine : field.theirs) || 'empty' }}</span>
                </label>
              </td>
            }
          </tr>
        }
      </tbody>
    </table>
    <div class="actions-row">
      <button matButton="filled" type="button" (click)="resolve.emit(chosen())">Go on with this</button>
      <button matButton="outlined" type="button" (click)="discard.emit()">Throw mine away</button>
    </div>
  `,
  styles: `
    :host {
      display: grid;
      gap: 12px;
      padding: 12px 16px 16px;
      border-left: 3px solid var(--indeterminate);
      background: var(--indeterminate-ground);
    }
    tbody th {
      padding: 4px 10px;
      text-align: left;
    }
    .words {
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }
    .choice {
      align-items: flex-start;
      padding: 4px 0;
    }
    tr:hover td,
    td.chosen {
      background: var(--sheet);
    }
  `,
})
export class ConflictView {
  /** What it is about: "Quantity Q-012". */
  readonly what = input.required<string>();
  readonly by = input('');
  readonly fields = input.required<readonly ConflictField[]>();
  /** The side chosen for each field, by its name; only those that differ. */
  readonly resolve = output<Readonly<Record<string, Side>>>();
  readonly discard = output<void>();

  protected readonly sides: readonly Side[] = ['theirs', 'mine'];
  protected readonly differing = computed(() => this.fields().filter((field) => field.theirs !== field.mine));
  protected readonly chosen = linkedSignal<Readonly<Record<string, Side>>>(() =>
    Object.fromEntries(this.differing().map((field) => [field.field, 'mine' as const])),
  );

  protected choose(field: string, side: Side): void {
    this.chosen.update((chosen) => ({ ...chosen, [field]: side }));
  }
}
