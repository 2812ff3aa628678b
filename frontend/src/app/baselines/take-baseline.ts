import {
  ChangeDetectionStrategy,
  Component,
  DestroyRef,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  inject,
  signal,
} from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { Drafts } from '../core/drafts/drafts';
import { ErrorLine } from '../core/errors/error-line';
import { load } from '../core/http/load';
import { type ProblemError, toProblem } from '../core/http/problem-error';
import { StudyContext } from '../core/study/study-context';
import { TitleBlock } from '../core/title-block';
import { Control, Field } from '../ui/field/field';
import { Waiting } from '../ui/waiting/waiting';
import { BaselinesApi, type NewBaseline } from './baselines-api';
import { type Candidate, PickList } from './pick-list';

const NEEDED = { name: 'A baseline needs a name.', review: 'Name the review at which it is taken.' } as const;

type BaselineWords = Pick<NewBaseline, 'name' | 'review' | 'note' | 'openItems'>;

/** Takes a baseline: what becomes baselined, what becomes controlled, under which name and at which review. */
@Component({
  selector: 'dp-take-baseline',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Control, Field, PickList, ReactiveFormsModule, RouterLink, Waiting],
  templateUrl: './take-baseline.html',
  styleUrl: './take-baseline.scss',
})
export class TakeBaseline {
  private readonly api = inject(BaselinesApi);
  private readonly drafts = inject(Drafts);
  private readonly line = inject(ErrorLine);
  private readonly router = inject(Router);
  protected readonly context = inject(StudyContext);
  private readonly injector = inject(Injector);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef).nativeElement;
  private readonly slot = `baseline.${this.context.study() ?? ''}`;

  protected readonly form = inject(NonNullableFormBuilder).group<BaselineWords>({
    name: '',
    review: '',
    note: '',
    openItems: 'listed',
  });
  private readonly typed = toSignal(this.form.valueChanges, { initialValue: this.form.value });
  private readonly asked = signal(false);
  protected readonly problem = signal<ProblemError | null>(null);
  private readonly busy = signal(false);

  protected readonly baselines = load(
    () => this.context.readKey(),
    () => this.api.list(),
  );
  private readonly candidates = computed(() => this.baselines.value()?.candidates);
  protected readonly requirements = computed<readonly Candidate[]>(() =>
    (this.candidates()?.requirements ?? []).map(({ id, key, title, state, toBeResolved }) => ({
      id,
      key,
      title,
      note: [state === 'in preparation' ? 'in preparation, to be submitted first' : state]
        .concat(toBeResolved ? ['to be resolved'] : [])
        .join(', '),
      isBarred: state === 'in preparation',
    })),
  );
  protected readonly quantities = computed<readonly Candidate[]>(() =>
    (this.candidates()?.quantities ?? []).map(({ id, key, name, bearsOn }) => ({
      id,
      key,
      title: name,
      note: `bears on ${bearsOn} ${bearsOn === 1 ? 'verdict' : 'verdicts'}`,
    })),
  );
  private readonly inReview = computed(
    () =>
      new Set((this.candidates()?.requirements ?? []).filter(({ state }) => state === 'in review').map(({ id }) => id)),
  );
  /** What the person picked; until then what is in review, as it comes and goes. */
  private readonly pickedRequirements = signal<ReadonlySet<string> | null>(null);
  protected readonly requirementIds = computed(() => this.pickedRequirements() ?? this.inReview());
  protected readonly quantityIds = signal<ReadonlySet<string>>(new Set());
  protected readonly openItems = computed(() =>
    (this.candidates()?.requirements ?? [])
      .filter(({ id, toBeResolved }) => toBeResolved && this.requirementIds().has(id))
      .map(({ key }) => key),
  );

  protected readonly mayTake = computed(() => this.context.holds('board-chair'));
  protected readonly messages = computed(() => {
    const empty = (field: 'name' | 'review'): boolean => this.asked() && (this.typed()[field] ?? '').trim() === '';
    const refused = (field: string): string => this.problem()?.fieldMessage(field) ?? '';
    return {
      name: empty('name') ? NEEDED.name : refused('name'),
      review: empty('review') ? NEEDED.review : refused('review'),
      note: refused('note'),
      requirements: refused('requirementIds'),
      quantities: refused('quantityIds'),
    };
  });
  /** A refusal that belongs to no field here. */
  protected readonly other = computed(() => {
    const problem = this.problem();
    const shown = Object.values(this.messages()).some((message) => message !== '');
    return problem !== null && !shown ? problem : null;
  });

  constructor() {
    this.drafts.follow(this.slot, this.form, inject(DestroyRef));
    inject(TitleBlock).register({
      name: () => 'New baseline',
      actions: () => [
        { label: 'Leave it', run: () => void this.leave() },
        {
          label: 'Take the baseline',
          main: true,
          shortcut: 'Ctrl+Enter',
          run: () => void this.take(),
          ...this.hindrance(),
        },
      ],
    });
  }

  protected pickRequirements(ids: ReadonlySet<string>): void {
    this.pickedRequirements.set(ids);
  }

  protected async take(): Promise<void> {
    this.asked.set(true);
    this.problem.set(null);
    const { name, review, note, openItems } = this.form.getRawValue();
    if (this.busy()) return;
    if (name.trim() === '' || review.trim() === '') return this.showProblem();
    this.busy.set(true);
    try {
      const answer = await firstValueFrom(
        this.api.take({
          name,
          review,
          note,
          openItems,
          requirementIds: this.standing(this.requirementIds(), this.requirements()),
          quantityIds: this.standing(this.quantityIds(), this.quantities()),
        }),
      );
      this.drafts.discard(this.slot);
      this.line.tell(`Baseline ${answer.created[0]?.key ?? ''} was taken at r${answer.revision}.`);
      await this.leave();
    } catch (error) {
      this.problem.set(toProblem(error));
      this.showProblem();
    } finally {
      this.busy.set(false);
    }
  }

  private hindrance(): { disabled?: boolean; reason?: string } {
    if (!this.mayTake()) return { disabled: true, reason: 'A baseline is taken by the board chair.' };
    if (this.baselines.value() === undefined || this.busy()) return { disabled: true };
    return {};
  }

  /** Brings what was refused into view, which may be far from the button. */
  private showProblem(): void {
    afterNextRender(() => this.host.querySelector('[role="alert"]')?.scrollIntoView({ block: 'center' }), {
      injector: this.injector,
    });
  }

  /** What was picked and is still a candidate. */
  private standing(ids: ReadonlySet<string>, candidates: readonly Candidate[]): string[] {
    return candidates.filter(({ id }) => ids.has(id)).map(({ id }) => id);
  }

  private async leave(): Promise<void> {
    await this.router.navigate(this.context.link('baselines'));
  }
}
