import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  computed,
  effect,
  inject,
  signal,
  untracked,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder } from '@angular/forms';
import { ActivatedRoute, Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../../core/drafts/drafts';
import { load } from '../../core/http/load';
import { type ProblemError, toProblem } from '../../core/http/problem-error';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { TitleBlock } from '../../core/title-block';
import { Acts } from '../../core/acts/acts';
import { RequirementApi } from '../requirement-api';
import { formOf } from './form-of';
import { RequirementFields } from './requirement-fields';
import { BLANK, faultsOf, fieldsOf } from './requirement-text';
import { refusedField } from '../../core/acts/refused-field';

/** Writes a new requirement, under one or more parents; opens its sheet when it is saved. */
@Component({
  selector: 'dp-new-requirement',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RequirementFields],
  template: `
    <section class="sheet">
      <div class="sheet-head">
        <h1>Write a requirement</h1>
        <p class="faint">
          What you type is kept on this device until you save it.
          @if (isRestored()) {
            This is what you last left here.
            <button type="button" class="quiet" (click)="throwAway()">Throw it away</button>
          }
        </p>
      </div>
      <dp-requirement-fields
        [isNew]="true"
        [form]="form"
        [elements]="elements()"
        [problem]="problem()"
        [asked]="asked()"
      >
        <div class="parents" role="group" aria-label="Parents">
          <span class="strong small">Parents</span>
          <ul class="rows">
            @for (parent of parents(); track parent.id) {
              <li>
                <span class="key">{{ parent.key }}</span> {{ parent.title }}
                <button type="button" class="quiet" (click)="leave(parent.id)">
                  Remove<span class="only-heard"> {{ parent.key }}</span>
                </button>
              </li>
            } @empty {
              <li class="faint">None: it stands at the top of the flow-down.</li>
            }
          </ul>
          <label class="small">
            <span class="only-heard">Add a parent</span>
            <select #add class="control" (change)="join(add.value); add.value = ''">
              <option value="">Add a parent …</option>
              @for (choice of choices(); track choice.id) {
                <option [value]="choice.id">{{ choice.key }} {{ choice.title }}</option>
              }
            </select>
          </label>
          @if (parentsRefused()) {
            <p class="refused" role="alert">{{ parentsRefused() }}</p>
          }
        </div>
      </dp-requirement-fields>
      @if (unplaced(); as problem) {
        <div class="note bad" role="alert">
          <strong>{{ problem.title }}</strong> {{ problem.detail }}
        </div>
      }
    </section>
  `,
  styles: `
    .parents {
      display: grid;
      gap: 4px;
    }
    .refused {
      margin: 0;
      color: var(--non-compliant);
      font-size: 13px;
    }
  `,
})
export class NewRequirement {
  private readonly api = inject(RequirementApi);
  private readonly edits = inject(Edits);
  private readonly acts = inject(Acts);
  private readonly drafts = inject(Drafts);
  private readonly router = inject(Router);
  private readonly context = inject(StudyContext);

  private readonly query = toSignal(inject(ActivatedRoute).queryParamMap, { requireSync: true });
  private readonly under = this.query().get('parent');
  private readonly draft = `new-requirement.${this.context.study() ?? ''}.${this.under ?? ''}`;

  protected readonly form = formOf(inject(NonNullableFormBuilder), BLANK);
  protected readonly isRestored = signal(this.drafts.follow(this.draft, this.form, inject(DestroyRef)));
  protected readonly asked = signal(false);
  protected readonly busy = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);

  private readonly tree = load(
    () => this.context.readKey(),
    () => this.api.productTree(),
  );
  private readonly flowDown = load(
    () => this.context.readKey(),
    () => this.api.flowDown(),
  );
  protected readonly elements = computed(() => this.tree.value()?.rows ?? []);
  private readonly all = computed(() => {
    const byId = new Map((this.flowDown.value()?.rows ?? []).map((row) => [row.id, row]));
    return [...byId.values()].sort((a, b) => a.key.localeCompare(b.key));
  });
  /** Ids of the parents; undefined until the one named in the address is known. */
  private readonly parentIds = signal<readonly string[] | undefined>(undefined);
  protected readonly parents = computed(() => this.all().filter((row) => this.parentIds()?.includes(row.id)));
  protected readonly choices = computed(() => this.all().filter((row) => !this.parentIds()?.includes(row.id)));
  protected readonly parentsRefused = computed(() => refusedField(this.problem(), 'parentIds', 'parentIds.0'));
  /** A refusal that stands beside no field. */
  protected readonly unplaced = computed(() => {
    const problem = this.problem();
    return problem !== null && problem.fields.length === 0 ? problem : null;
  });

  constructor() {
    inject(TitleBlock).register({
      name: () => 'New requirement',
      actions: () => [
        { label: 'Leave it', run: () => this.goBack() },
        {
          label: 'Save the requirement',
          main: true,
          shortcut: 'Ctrl+Enter',
          disabled: this.busy(),
          run: () => void this.save(),
        },
      ],
    });
    effect(() => {
      if (this.flowDown.value() === undefined || this.tree.value() === undefined) return;
      untracked(() => {
        if (this.parentIds() === undefined) this.begin();
      });
    });
  }

  protected join(id: string): void {
    if (id !== '') this.parentIds.update((ids) => [...(ids ?? []), id]);
  }

  protected leave(id: string): void {
    this.parentIds.update((ids) => (ids ?? []).filter((other) => other !== id));
  }

  protected throwAway(): void {
    this.drafts.discard(this.draft);
    this.form.reset(BLANK);
    this.isRestored.set(false);
    this.asked.set(false);
    this.problem.set(null);
    this.begin();
  }

  /** Starts below the parent named in the address: its element, and the level below its own. */
  private begin(): void {
    const parent = this.all().find((row) => row.key === this.under);
    this.parentIds.set(parent === undefined ? [] : [parent.id]);
    // What was typed while this was being read stays.
    const typed = this.form.getRawValue();
    const levels = this.context.head.value()?.study.levels ?? [];
    const level = parent === undefined ? levels[0] : (levels[levels.indexOf(parent.level) + 1] ?? parent.level);
    const element = this.elements().find((row) => row.key === parent?.element?.key);
    this.form.patchValue({
      level: typed.level || (level ?? ''),
      elementId: typed.elementId || (this.isRestored() ? '' : (element?.id ?? '')),
    });
  }

  private async save(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const text = { ...BLANK, ...this.form.getRawValue() };
    if (Object.keys(faultsOf(text, true)).length > 0) return this.showFirstFault();
    const prefix = text.prefix.trim();
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(
        this.edits.give([
          {
            type: 'requirement.create',
            ...fieldsOf(text),
            ...(prefix === '' ? {} : { prefix }),
            parentIds: [...(this.parentIds() ?? [])],
          },
        ]),
      );
      this.drafts.discard(this.draft);
      this.form.markAsPristine();
      const key = answer.created.find((one) => one.command === 0)?.key;
      const isDraft = this.context.standpoint().kind === 'draft';
      this.acts.tell(answer, `${isDraft || key === undefined ? 'The requirement' : key} was written`);
      const target = isDraft || key === undefined ? ['requirements'] : ['requirements', key];
      await this.router.navigate(this.context.link(...target), { queryParams: this.context.readParams() });
    } catch (error) {
      this.problem.set(toProblem(error));
      this.showFirstFault();
    } finally {
      this.busy.set(false);
    }
  }

  private goBack(): void {
    void this.router.navigate(this.context.link('requirements'), {
      queryParams: { ...this.context.readParams(), ...(this.under === null ? {} : { select: this.under }) },
    });
  }

  private showFirstFault(): void {
    requestAnimationFrame(() => document.querySelector<HTMLElement>('dp-field [aria-invalid="true"]')?.focus());
  }
}
