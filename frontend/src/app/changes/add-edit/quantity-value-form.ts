import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import type { Command, QuantityRow } from '@shared/contract';
import { type ProblemError } from '../../core/http/problem-error';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Control, Field } from '../../ui/field/field';
import { QuantityField, typedMeasure } from '../../ui/measure/quantity-field';

/** Proposes another value of a quantity. */
@Component({
  selector: 'dp-quantity-value-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, QuantityField, ReactiveFormsModule],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="send()">
      <dp-field label="Quantity" [error]="asked() && !chosen() ? 'Choose the quantity that is to change.' : ''">
        <select dpControl formControlName="id">
          <option value="">Choose one</option>
          @for (row of rows(); track row.id) {
            <option [value]="row.id">{{ row.key }} {{ row.name }}</option>
          }
        </select>
      </dp-field>
      @if (chosen(); as quantity) {
        <dp-quantity-field
          label="New value"
          formControlName="value"
          [unit]="quantity.unit"
          [temperature]="quantity.temperature"
          [hint]="now()"
          [error]="valueError()"
        />
        <dp-field label="Source" optional hint="Where the new value comes from." [error]="refused('source')">
          <input dpControl formControlName="source" />
        </dp-field>
      }
      <ng-content />
    </form>
  `,
})
export class QuantityValueForm {
  private readonly units = inject(UnitPreferences);
  readonly rows = input.required<readonly QuantityRow[]>();
  readonly problem = input<ProblemError | null>(null);
  readonly propose = output<Command>();

  protected readonly form = inject(NonNullableFormBuilder).group({ id: '', value: '', source: '' });
  protected readonly asked = signal(false);
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  protected readonly chosen = computed(() => this.rows().find(({ id }) => id === this.typed().id));
  protected readonly now = computed(() => {
    const quantity = this.chosen();
    if (!quantity?.value) return 'No value yet.';
    const { si, unit } = quantity.value;
    return `Now ${this.units.show(si, unit, { temperature: quantity.temperature })}`;
  });
  protected readonly valueError = computed(() =>
    this.asked() && (this.typed().value ?? '').trim() === ''
      ? 'Type the new value with its unit.'
      : this.refused('value'),
  );

  protected refused(field: string): string {
    return this.problem()?.fieldMessage(field) ?? '';
  }

  protected send(): void {
    this.asked.set(true);
    const quantity = this.chosen();
    if (quantity === undefined) return;
    const { value, source } = this.form.getRawValue();
    const measure = typedMeasure(value, quantity.unit, quantity.temperature);
    if (measure === null) return;
    const { id, version } = quantity;
    this.propose.emit({
      type: 'quantity.set',
      id,
      version,
      value: measure,
      ...(source.trim() === '' ? {} : { source }),
    });
  }
}
