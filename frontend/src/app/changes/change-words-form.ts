import {
  ChangeDetectionStrategy,
  Component,
  type OnInit,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import type { ChangeSheet } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { type ConflictField, ConflictView, type Side } from '../ui/conflict/conflict-view';
import { Control, Field } from '../ui/field/field';
import { ChangesApi, type ChangeWords } from './changes-api';

const LABELS: Readonly<Record<keyof ChangeWords, string>> = {
  title: 'Title',
  reason: 'Reason',
  due: 'Decision due',
};
const FIELDS = Object.keys(LABELS) as readonly (keyof ChangeWords)[];

/** Edits title, reason and due day of a draft. What others save meanwhile does not touch what is typed here. */
@Component({
  selector: 'dp-change-words-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ConflictView, Control, Field, MatButton, ReactiveFormsModule],
  template: `
    @if (theirs(); as fields) {
      <dp-conflict-view
        [what]="'Change request ' + sheet().key"
        [fields]="fields"
        (resolve)="settle($event)"
        (discard)="closed.emit()"
      />
    } @else {
      <form class="form" [formGroup]="form" (ngSubmit)="save()">
        <dp-field label="Title" [error]="refused('title')"><input dpControl formControlName="title" /></dp-field>
        <dp-field label="Reason" hint="Why the change is needed." [error]="refused('reason')">
          <textarea dpControl formControlName="reason" rows="5"></textarea>
        </dp-field>
        <dp-field label="Decision due" optional [error]="refused('due')">
          <input dpControl type="date" formControlName="due" />
        </dp-field>
        @if (problem(); as problem) {
          <div class="note bad" role="alert">
            <strong>{{ problem.title }}</strong> {{ problem.detail }}
          </div>
        }
        <div class="actions-row">
          <button matButton="filled" type="submit" [disabled]="busy()">Save</button>
          <button matButton="text" type="button" (click)="closed.emit()">Leave it</button>
        </div>
      </form>
    }
  `,
})
export class ChangeWordsForm implements OnInit {
  private readonly api = inject(ChangesApi);
  readonly sheet = input.required<ChangeSheet>();
  readonly closed = output<void>();

  protected readonly form = inject(NonNullableFormBuilder).group({ title: '', reason: '', due: '' });
  protected readonly problem = signal<ProblemError | null>(null);
  protected readonly busy = signal(false);
  private readonly current = signal<ChangeSheet | null>(null);
  private seen: ChangeSheet | undefined;

  protected readonly theirs = computed<readonly ConflictField[] | null>(() => {
    const current = this.current();
    if (current === null) return null;
    const typed = this.form.getRawValue();
    return FIELDS.map((field) => ({
      field,
      label: LABELS[field],
      theirs: current[field] ?? '',
      mine: typed[field],
    }));
  });

  ngOnInit(): void {
    this.startFrom(this.sheet());
    const { title, reason, due } = this.sheet();
    this.form.setValue({ title, reason, due: due ?? '' });
  }

  protected refused(field: keyof ChangeWords): string {
    return this.problem()?.fieldMessage(field) ?? '';
  }

  protected settle(sides: Readonly<Record<string, Side>>): void {
    const current = this.current();
    if (current === null) return;
    for (const field of FIELDS) if (sides[field] === 'theirs') this.form.controls[field].setValue(current[field] ?? '');
    this.startFrom(current);
    this.current.set(null);
    void this.save();
  }

  protected async save(): Promise<void> {
    const seen = this.seen;
    if (seen === undefined) return;
    const changes = this.changedFrom(seen);
    if (Object.keys(changes).length === 0) return this.closed.emit();
    this.busy.set(true);
    this.problem.set(null);
    try {
      await firstValueFrom(this.api.step({ type: 'change.revise', id: seen.id, version: seen.version, changes }));
      this.closed.emit();
    } catch (error) {
      const problem = toProblem(error);
      if (problem.code === 'stale') this.current.set(await firstValueFrom(this.api.sheet(seen.key)));
      else this.problem.set(problem);
    } finally {
      this.busy.set(false);
    }
  }

  private startFrom(sheet: ChangeSheet): void {
    this.seen = sheet;
  }

  private changedFrom(seen: ChangeSheet): Partial<ChangeWords> {
    const { title, reason, due } = this.form.getRawValue();
    return {
      ...(title === seen.title ? {} : { title }),
      ...(reason === seen.reason ? {} : { reason }),
      ...(due === (seen.due ?? '') ? {} : { due: due || null }),
    };
  }
}
