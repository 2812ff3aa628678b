import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import {
  MAT_DIALOG_DATA,
  MatDialogActions,
  MatDialogClose,
  MatDialogContent,
  MatDialogRef,
  MatDialogTitle,
} from '@angular/material/dialog';
import { type ProblemError, toProblem } from '../http/problem-error';
import { Control, Field } from '../../ui/field/field';
import { refusedField } from './refused-field';

export type Values = Readonly<Record<string, string>>;

/** One field of a short form. */
export interface AskedField {
  readonly name: string;
  readonly label: string;
  readonly kind: 'line' | 'text' | 'choice' | 'day' | 'tick';
  readonly choices?: readonly { readonly value: string; readonly label: string }[];
  readonly hint?: string;
  readonly optional?: boolean;
  /** What stands there at first; a tick is "yes" or empty. */
  readonly value?: string;
  readonly shownIf?: (values: Values) => boolean;
  /** Names under which the server refuses it, where they differ from `name`. */
  readonly refusedAs?: readonly string[];
}

/** A short form: what it is about, its fields, and what is done with them; `send` fails with ProblemError. */
export interface FieldsQuestion {
  readonly title: string;
  readonly text: string;
  readonly action: string;
  readonly fields: readonly AskedField[];
  readonly send: (values: Values) => Promise<unknown>;
}

/** Asks for a few fields and sends them; what is refused is said beside its field and what was typed stays. Closes with true. */
@Component({
  selector: 'dp-fields-dialog',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, MatButton, MatDialogActions, MatDialogClose, MatDialogContent, MatDialogTitle],
  template: `
    <form (submit)="send($event)" novalidate>
      <h2 mat-dialog-title>{{ question.title }}</h2>
      <mat-dialog-content>
        <div class="form">
          @if (question.text) {
            <p>{{ question.text }}</p>
          }
          @for (field of fields(); track field.name) {
            @if (field.kind === 'tick') {
              <label class="choice">
                <input
                  #tick
                  type="checkbox"
                  [checked]="values()[field.name] === 'yes'"
                  (change)="set(field.name, tick.checked ? 'yes' : '')"
                />
                {{ field.label }}
              </label>
            } @else {
              <dp-field
                [label]="field.label"
                [hint]="field.hint ?? ''"
                [optional]="field.optional ?? false"
                [error]="messages()[field.name]"
              >
                @switch (field.kind) {
                  @case ('choice') {
                    <select dpControl #choice (change)="set(field.name, choice.value)">
                      @for (option of field.choices; track option.value) {
                        <option [value]="option.value" [selected]="option.value === values()[field.name]">
                          {{ option.label }}
                        </option>
                      }
                    </select>
                  }
                  @case ('text') {
                    <textarea
                      dpControl
                      #text
                      rows="3"
                      [value]="values()[field.name]"
                      (input)="set(field.name, text.value)"
                    ></textarea>
                  }
                  @default {
                    <input
                      dpControl
                      #line
                      [type]="field.kind === 'day' ? 'date' : 'text'"
                      [value]="values()[field.name]"
                      (input)="set(field.name, line.value)"
                    />
                  }
                }
              </dp-field>
            }
          }
          @if (unplaced(); as problem) {
            <div class="note bad" role="alert">
              <strong>{{ problem.title }}.</strong> {{ problem.detail }}
            </div>
          }
        </div>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button type="button" matButton="text" [mat-dialog-close]="undefined">Leave it</button>
        <button type="submit" matButton="filled" [disabled]="busy()">{{ question.action }}</button>
      </mat-dialog-actions>
    </form>
  `,
  styles: `
    p {
      margin: 0;
    }
  `,
})
export class FieldsDialog {
  private readonly dialog = inject<MatDialogRef<FieldsDialog, true>>(MatDialogRef);
  protected readonly question = inject<FieldsQuestion>(MAT_DIALOG_DATA);
  protected readonly values = signal<Values>(
    Object.fromEntries(this.question.fields.map((field) => [field.name, field.value ?? firstChoice(field)])),
  );
  private readonly asked = signal(false);
  private readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);

  protected readonly fields = computed(() =>
    this.question.fields.filter((field) => field.shownIf?.(this.values()) ?? true),
  );
  protected readonly messages = computed<Values>(() =>
    Object.fromEntries(this.fields().map((field) => [field.name, this.messageOf(field)])),
  );
  /** A refusal that stands beside no field of this form. */
  protected readonly unplaced = computed(() => {
    const problem = this.problem();
    return problem !== null && Object.values(this.messages()).every((message) => message === '') ? problem : null;
  });

  protected set(name: string, value: string): void {
    this.values.update((values) => ({ ...values, [name]: value }));
  }

  protected async send(event: Event): Promise<void> {
    event.preventDefault();
    this.asked.set(true);
    this.problem.set(null);
    if (this.busy() || Object.values(this.messages()).some((message) => message !== '')) return;
    this.busy.set(true);
    try {
      await this.question.send(this.values());
      this.dialog.close(true);
    } catch (error) {
      this.problem.set(toProblem(error));
    } finally {
      this.busy.set(false);
    }
  }

  private messageOf(field: AskedField): string {
    const isMissing = field.kind !== 'tick' && !field.optional && (this.values()[field.name] ?? '').trim() === '';
    if (this.asked() && isMissing) return `${field.label} is needed here.`;
    return refusedField(this.problem(), field.name, ...(field.refusedAs ?? []));
  }
}

function firstChoice(field: AskedField): string {
  return field.kind === 'choice' ? (field.choices?.[0]?.value ?? '') : '';
}
