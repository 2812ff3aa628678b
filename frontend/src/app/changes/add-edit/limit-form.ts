import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import type { Command, FlowRow, Limit, LimitInput, Measure } from '@shared/contract';
import { type ProblemError } from '../../core/http/problem-error';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { Control, Field } from '../../ui/field/field';
import { limitText } from '../../ui/limit/limit-text';
import { QuantityField, typedMeasure } from '../../ui/measure/quantity-field';

const RELATIONS: readonly Limit['relation'][] = ['at least', 'at most', 'between', 'equal within'];

interface LimitTyped {
  readonly id: string;
  readonly relation: Limit['relation'];
  readonly value: string;
  readonly upper: string;
  readonly tolerance: string;
}

/** Proposes another limit of a requirement. */
@Component({
  selector: 'dp-limit-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, QuantityField, ReactiveFormsModule],
  template: `
    <form class="form" [formGroup]="form" (ngSubmit)="send()">
      <dp-field
        label="Requirement"
        [hint]="now()"
        [error]="asked() && !chosen() ? 'Choose the requirement whose limit is to change.' : ''"
      >
        <select dpControl formControlName="id" (change)="start()">
          <option value="">Choose one</option>
          @for (row of limited(); track row.id) {
            <option [value]="row.id">{{ row.key }} {{ row.title }}</option>
          }
        </select>
      </dp-field>
      @if (chosen()?.limit; as limit) {
        <dp-field label="Relation">
          <select dpControl formControlName="relation">
            @for (relation of relations; track relation) {
              <option [value]="relation">{{ relation }}</option>
            }
          </select>
        </dp-field>
        <dp-quantity-field
          [label]="relation() === 'between' ? 'Lower value' : 'Value'"
          formControlName="value"
          [unit]="limit.value.unit"
          [temperature]="limit.temperature"
          [error]="refused('limit.value')"
        />
        @if (relation() === 'between') {
          <dp-quantity-field
            label="Upper value"
            formControlName="upper"
            [unit]="limit.value.unit"
            [temperature]="limit.temperature"
            [error]="refused('limit.upper')"
          />
        }
        @if (relation() === 'equal within') {
          <dp-quantity-field
            label="Tolerance"
            formControlName="tolerance"
            temperature="difference"
            [unit]="limit.value.unit"
            [error]="refused('limit.tolerance')"
          />
        }
      }
      <ng-content />
    </form>
  `,
})
export class LimitForm {
  private readonly units = inject(UnitPreferences);
  readonly rows = input.required<readonly FlowRow[]>();
  readonly problem = input<ProblemError | null>(null);
  readonly propose = output<Command>();

  protected readonly relations = RELATIONS;
  protected readonly form = inject(NonNullableFormBuilder).group<LimitTyped>({
    id: '',
    relation: 'at least',
    value: '',
    upper: '',
    tolerance: '',
  });
  protected readonly asked = signal(false);
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  protected readonly limited = computed(() => {
    const once = new Map(this.rows().map((row) => [row.id, row]));
    return [...once.values()].filter(({ limit }) => limit !== null);
  });
  protected readonly chosen = computed(() => this.limited().find(({ id }) => id === this.typed().id));
  protected readonly relation = computed(() => this.typed().relation);
  protected readonly now = computed(() => {
    const limit = this.chosen()?.limit ?? null;
    return limit === null ? '' : `Now ${limitText(limit, this.units.show.bind(this.units))}`;
  });

  protected refused(field: string): string {
    return this.problem()?.fieldMessage(field) ?? '';
  }

  /** Starts from the limit as it is. */
  protected start(): void {
    const limit = this.chosen()?.limit;
    if (!limit) return;
    const { relation, value, upper, tolerance } = limit;
    this.form.patchValue({ relation, value: text(value), upper: text(upper), tolerance: text(tolerance) });
  }

  protected send(): void {
    this.asked.set(true);
    const requirement = this.chosen();
    if (!requirement?.limit) return;
    const limit = this.limitTyped(requirement.limit);
    if (limit === null) return;
    const { id, version } = requirement;
    this.propose.emit({ type: 'requirement.revise', id, version, changes: { limit } });
  }

  private limitTyped(before: Limit): LimitInput | null {
    const typed = this.form.getRawValue();
    const { unit } = before.value;
    const { temperature, condition } = before;
    const value = typedMeasure(typed.value, unit, temperature);
    if (value === null) return null;
    const limit = { relation: typed.relation, value, temperature, condition };
    if (typed.relation === 'between') {
      const upper = typedMeasure(typed.upper, unit, temperature);
      return upper === null ? null : { ...limit, upper };
    }
    if (typed.relation === 'equal within') {
      const tolerance = typedMeasure(typed.tolerance, unit, 'difference');
      return tolerance === null ? null : { ...limit, tolerance };
    }
    return limit;
  }
}

function text(measure: Measure | null): string {
  return measure === null ? '' : `${measure.text} ${measure.unit}`.trim();
}
