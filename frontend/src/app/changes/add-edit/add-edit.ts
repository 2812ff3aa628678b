import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { NgTemplateOutlet } from '@angular/common';
import { MatButton } from '@angular/material/button';
import type { ChangeSheet, Command } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { load } from '../../core/http/load';
import { type ProblemError, toProblem } from '../../core/http/problem-error';
import { StudyContext } from '../../core/study/study-context';
import { Waiting } from '../../ui/waiting/waiting';
import { ChangesApi } from '../changes-api';
import { LimitForm } from './limit-form';
import { QuantityValueForm } from './quantity-value-form';
import { ShareForm } from './share-form';

const KINDS = [
  { kind: 'quantity', label: 'The value of a quantity' },
  { kind: 'limit', label: 'The limit of a requirement' },
  { kind: 'share', label: 'Adopt a proposed share' },
] as const;

/** Adds one edit to a draft. Anything else is drafted where it stands, looking from the draft. */
@Component({
  selector: 'dp-add-edit',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [LimitForm, MatButton, NgTemplateOutlet, QuantityValueForm, ShareForm, Waiting],
  template: `
    <fieldset>
      <legend class="strong">What is to change?</legend>
      @for (choice of kinds; track choice.kind) {
        <label class="choice">
          <input
            type="radio"
            name="kind-of-edit"
            [checked]="kind() === choice.kind"
            (change)="kind.set(choice.kind); problem.set(null)"
          />
          {{ choice.label }}
        </label>
      }
    </fieldset>
    @for (round of [rounds()]; track round) {
      @switch (kind()) {
        @case ('quantity') {
          @if (quantities.value(); as view) {
            <dp-quantity-value-form [rows]="view.rows" [problem]="problem()" (propose)="propose($event)">
              <ng-container [ngTemplateOutlet]="foot" />
            </dp-quantity-value-form>
          } @else {
            <dp-waiting [state]="quantities" />
          }
        }
        @case ('limit') {
          @if (requirements.value(); as view) {
            <dp-limit-form [rows]="view.rows" [problem]="problem()" (propose)="propose($event)">
              <ng-container [ngTemplateOutlet]="foot" />
            </dp-limit-form>
          } @else {
            <dp-waiting [state]="requirements" />
          }
        }
        @case ('share') {
          @if (requirements.value(); as view) {
            <dp-share-form [rows]="view.rows" (propose)="propose($event)">
              <ng-container [ngTemplateOutlet]="foot" />
            </dp-share-form>
          } @else {
            <dp-waiting [state]="requirements" />
          }
        }
      }
    }
    <ng-template #foot>
      @if (problem(); as problem) {
        <div class="note bad" role="alert">
          <strong>{{ problem.title }}</strong> {{ problem.detail }}
        </div>
      }
      <div class="actions-row">
        <button matButton="filled" type="submit" [disabled]="busy()">Add the edit</button>
        <button matButton="text" type="button" (click)="closed.emit()">Done</button>
      </div>
      <p class="small faint">Everything else is drafted where it stands: look from this draft and edit on any page.</p>
    </ng-template>
  `,
  styles: `
    :host {
      display: grid;
      gap: 12px;
      padding: 12px 10px 16px;
      border-bottom: 1px solid var(--rule);
      background: var(--chosen);
    }
    fieldset {
      display: flex;
      flex-wrap: wrap;
      gap: 0 12px;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font-size: 13px;
    }
    p {
      margin: 0;
    }
  `,
})
export class AddEdit {
  private readonly api = inject(ChangesApi);
  private readonly context = inject(StudyContext);
  readonly sheet = input.required<ChangeSheet>();
  readonly closed = output<void>();

  protected readonly kinds = KINDS;
  protected readonly kind = signal<(typeof KINDS)[number]['kind']>('quantity');
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);
  /** Each added edit starts the form afresh. */
  protected readonly rounds = signal(0);
  private readonly place = computed(() => {
    const place = this.context.readKey();
    return place && { ...place, key: this.sheet().key, version: this.sheet().version };
  });
  protected readonly quantities = load(
    () => (this.kind() === 'quantity' ? this.place() : undefined),
    ({ key }) => this.api.quantitiesIn(key),
  );
  protected readonly requirements = load(
    () => (this.kind() === 'quantity' ? undefined : this.place()),
    ({ key }) => this.api.requirementsIn(key),
  );

  protected async propose(edit: Command): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    try {
      await firstValueFrom(this.api.propose(this.sheet().key, edit));
      this.rounds.update((rounds) => rounds + 1);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }
}
