import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  effect,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { FormControl, FormGroup, NonNullableFormBuilder } from '@angular/forms';
import { Router, RouterLink } from '@angular/router';
import type { Requirement, RequirementSheet } from '@shared/contract';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../../core/drafts/drafts';
import { load } from '../../core/http/load';
import { type ProblemError, toProblem } from '../../core/http/problem-error';
import { Edits } from '../../core/study/edits';
import { StudyContext } from '../../core/study/study-context';
import { TitleBlock } from '../../core/title-block';
import { type ConflictField, ConflictView, type Side } from '../../ui/conflict/conflict-view';
import { Waiting } from '../../ui/waiting/waiting';
import { Acts } from '../../core/acts/acts';
import { ProposeChange } from '../../core/acts/propose-change';
import { RequirementApi } from '../requirement-api';
import { formOf } from './form-of';
import { RequirementFields } from './requirement-fields';
import { BLANK, type RequirementText, changesBetween, faultsOf, textOf } from './requirement-text';
import { FIELD_NAMES, conflictFields, typedOver, withTheirs } from './requirement-conflict';

/** Edits a requirement in preparation, or in the draft of a change request. What somebody else changes meanwhile is shown beside what was typed. */
@Component({
  selector: 'dp-edit-requirement',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ConflictView, RequirementFields, RouterLink, Waiting],
  template: `
    <section class="sheet">
      <div class="sheet-head">
        <h1>Edit {{ key() }}</h1>
        <p class="faint">
          {{ into() }} What you type is kept on this device until you save it.
          @if (isDirty()) {
            <button type="button" class="quiet" (click)="throwAway()">Throw it away</button>
          }
        </p>
      </div>
      @if (sheet.value(); as value) {
        @if (!value.may.includes('requirement.revise')) {
          <div class="note warn">
            {{ whyNot(value) }}
            <a [routerLink]="context.link('requirements', key())" [queryParams]="context.readParams()"
              >Back to its sheet</a
            >
            @if (value.may.includes('change.write')) {
              <button type="button" class="quiet" (click)="propose(value)">Propose a change</button>
            }
          </div>
        }
        @if (conflict(); as fields) {
          <dp-conflict-view
            [what]="'Requirement ' + key()"
            [fields]="fields"
            (resolve)="resolve($event)"
            (discard)="throwAway()"
          />
        }
        <dp-requirement-fields
          [form]="form.controls.text"
          [elements]="tree.value()?.rows ?? []"
          [problem]="problem()"
          [asked]="asked()"
        />
        @if (unplaced(); as problem) {
          <div class="note bad" role="alert">
            <strong>{{ problem.title }}</strong> {{ problem.detail }}
          </div>
        }
      } @else {
        <dp-waiting [state]="sheet" />
      }
    </section>
  `,
  styles: `
    dp-conflict-view {
      max-width: 860px;
      margin-bottom: 24px;
    }
    .note {
      margin: 0 0 24px;
    }
  `,
})
export class EditRequirement {
  readonly key = input('');

  private readonly api = inject(RequirementApi);
  private readonly edits = inject(Edits);
  private readonly acts = inject(Acts);
  private readonly drafts = inject(Drafts);
  private readonly router = inject(Router);
  private readonly proposals = inject(ProposeChange);
  private readonly destroyed = inject(DestroyRef);
  private readonly injector = inject(Injector);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly context = inject(StudyContext);

  protected readonly sheet = load(
    () => {
      const read = this.context.readKey();
      // The key comes with the first check of the router's inputs.
      return read === undefined || this.key() === '' ? undefined : { ...read, key: this.key() };
    },
    ({ key }) => this.api.sheet(key),
  );
  protected readonly tree = load(
    () => this.context.readKey(),
    () => this.api.productTree(),
  );
  /** The text, and the version that it was typed on; the draft keeps both. */
  protected readonly form = new FormGroup({
    text: formOf(inject(NonNullableFormBuilder), BLANK),
    seen: new FormControl(0, { nonNullable: true }),
    before: new FormControl<RequirementText>(BLANK, { nonNullable: true }),
  });
  protected readonly isDirty = signal(false);
  protected readonly asked = signal(false);
  protected readonly busy = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  private readonly theirs = signal<Requirement | null>(null);
  protected readonly conflict = computed<readonly ConflictField[] | null>(() => {
    const theirs = this.theirs();
    return theirs === null ? null : conflictFields(textOf(theirs), this.form.controls.text.getRawValue());
  });
  protected readonly unplaced = computed(() => {
    const problem = this.problem();
    if (problem === null || this.theirs() !== null) return null;
    return problem.fields.some(({ field }) => FIELD_NAMES.some((name) => field.includes(name))) ? null : problem;
  });
  protected readonly into = computed(() => {
    const standpoint = this.context.standpoint();
    return standpoint.kind === 'draft' ? `Your edit goes into ${standpoint.key}.` : '';
  });

  constructor() {
    inject(TitleBlock).register({
      name: () => this.key(),
      actions: () => [
        { label: 'Back to the sheet', run: () => this.leave() },
        {
          label: 'Save',
          main: true,
          shortcut: 'Ctrl+Enter',
          disabled: this.busy() || this.theirs() !== null,
          reason: this.theirs() === null ? 'It is being saved.' : 'Choose first what shall stand.',
          run: () => void this.save(),
        },
      ],
    });
    let isFollowed = false;
    effect(() => {
      const sheet = this.sheet.value();
      if (sheet === undefined) return;
      untracked(() => {
        if (!isFollowed) {
          isFollowed = true;
          this.isDirty.set(this.drafts.follow(this.draft(), this.form, this.destroyed));
          this.form.valueChanges.subscribe(() => this.isDirty.set(this.form.dirty));
        }
        // What is being typed stays; what others changed is compared when it is saved.
        if (!this.form.dirty) this.fill(sheet);
      });
    });
  }

  protected whyNot(sheet: RequirementSheet): string {
    if (!this.context.isEditable()) return 'What is seen from here cannot be edited; go back to now.';
    if (sheet.state === 'baselined') return `${sheet.key} is baselined: it changes through the board.`;
    if (sheet.state === 'in review') return `${sheet.key} is in review; return it to preparation before editing it.`;
    if (sheet.state === 'withdrawn') return `${sheet.key} is withdrawn and stays as it was.`;
    return `${sheet.key} belongs to ${sheet.owner.name}; its owner and co-owners edit it.`;
  }

  protected propose(sheet: RequirementSheet): void {
    void this.proposals.open({
      title: `Change ${sheet.key}: `,
      what: `${sheet.key} ${sheet.title}`,
      edits: [],
      then: ['requirements', sheet.key, 'edit'],
    });
  }

  protected throwAway(): void {
    this.drafts.discard(this.draft());
    this.theirs.set(null);
    this.problem.set(null);
    this.asked.set(false);
    const sheet = this.sheet.value();
    if (sheet !== undefined) this.fill(sheet);
    this.sheet.reload();
  }

  protected resolve(chosen: Readonly<Record<string, Side>>): void {
    const theirs = this.theirs();
    if (theirs === null) return;
    const standing = textOf(theirs);
    this.form.patchValue({
      text: withTheirs(this.form.controls.text.getRawValue(), standing, chosen),
      seen: theirs.version,
      before: standing,
    });
    this.theirs.set(null);
    this.problem.set(null);
    void this.save();
  }

  private async save(): Promise<void> {
    const sheet = this.sheet.value();
    if (sheet === undefined) return;
    this.asked.set(true);
    this.problem.set(null);
    const { text, seen, before } = this.form.getRawValue();
    if (Object.keys(faultsOf(text, false)).length > 0) return;
    const changes = changesBetween(before, text);
    if (Object.keys(changes).length === 0) return this.leave();
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(
        this.edits.give([{ type: 'requirement.revise', id: sheet.id, version: seen, changes }]),
      );
      this.drafts.discard(this.draft());
      this.form.markAsPristine();
      this.acts.tell(answer, `${sheet.key} was saved`);
      this.leave();
    } catch (error) {
      const problem = toProblem(error);
      this.problem.set(problem);
      if (problem.code === 'stale' && isRequirement(problem.current)) this.ask(problem.current);
    } finally {
      this.busy.set(false);
    }
  }

  /** Shows both sides, and brings the choice into view: it stands above the fields. */
  private ask(theirs: Requirement): void {
    const { text, before } = this.form.getRawValue();
    this.form.patchValue({ text: typedOver(text, before, textOf(theirs)) });
    this.theirs.set(theirs);
    const host = this.host.nativeElement;
    afterNextRender(() => host.querySelector<HTMLElement>('dp-conflict-view input')?.focus(), {
      injector: this.injector,
    });
  }

  private fill(sheet: RequirementSheet): void {
    const text = textOf(sheet);
    this.form.reset({ text, seen: sheet.version, before: text }, { emitEvent: true });
    this.isDirty.set(false);
  }

  private draft(): string {
    return `requirement.${this.context.study() ?? ''}.${this.key()}`;
  }

  private leave(): void {
    void this.router.navigate(this.context.link('requirements', this.key()), {
      queryParams: this.context.readParams(),
    });
  }
}

function isRequirement(value: unknown): value is Requirement {
  return typeof value === 'object' && value !== null && 'text' in value && 'limit' in value && 'version' in value;
}
